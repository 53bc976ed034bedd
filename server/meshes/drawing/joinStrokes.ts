import type { Stroke } from './visibleLines'

/** Corners that lie nearer to the straight line than this many pixels are left out. */
const STRAIGHT = 0.22
/** Ends within a twentieth of a pixel are one point. */
const GRID = 20

type Line = [number, number][]

/**
 * Path data of many strokes: joined end to end, straightened, rounded to tenths and written relative, so that a drawing stays small.
 * Where several lines meet, the one that goes on most nearly straight is taken. What is shorter than `speck` pixels is left out.
 */
export function joinStrokes(strokes: readonly Stroke[], speck: number): string {
  return chain(withoutDoubles(strokes))
    .filter((line) => lengthOf(line) > speck)
    .map((line) => straighten(line))
    .map(pathOf)
    .join('')
}

function withoutDoubles(strokes: readonly Stroke[]): Stroke['ends'][] {
  const seen = new Map<string, Stroke['ends']>()
  for (const { ends } of strokes) {
    const one = keyOf(ends[0], ends[1])
    const other = keyOf(ends[2], ends[3])
    if (one !== other) seen.set(one < other ? `${one} ${other}` : `${other} ${one}`, ends)
  }
  return [...seen.values()]
}

function keyOf(x: number, y: number): string {
  return `${Math.round(x * GRID)},${Math.round(y * GRID)}`
}

function chain(strokes: readonly Stroke['ends'][]): Line[] {
  const meeting = new Map<string, number[]>()
  strokes.forEach(([ax, ay, bx, by], index) => {
    for (const key of [keyOf(ax, ay), keyOf(bx, by)]) {
      const there = meeting.get(key)
      if (there === undefined) meeting.set(key, [index])
      else there.push(index)
    }
  })
  const used = new Uint8Array(strokes.length)
  const goOn = (line: Line): void => {
    for (;;) {
      const [px, py] = line.at(-2)!
      const [x, y] = line.at(-1)!
      let best: [number, number] | undefined
      let chosen = -1
      let straightest = -0.4
      for (const index of meeting.get(keyOf(x, y)) ?? []) {
        if (used[index] === 1) continue
        const [ax, ay, bx, by] = strokes[index]!
        const far: [number, number] = keyOf(ax, ay) === keyOf(x, y) ? [bx, by] : [ax, ay]
        const cosine =
          ((far[0] - x) * (x - px) + (far[1] - y) * (y - py)) /
          (Math.hypot(far[0] - x, far[1] - y) * Math.hypot(x - px, y - py) || 1)
        if (cosine > straightest) {
          straightest = cosine
          best = far
          chosen = index
        }
      }
      if (best === undefined) return
      used[chosen] = 1
      line.push(best)
    }
  }
  const lines: Line[] = []
  strokes.forEach(([ax, ay, bx, by], index) => {
    if (used[index] === 1) return
    used[index] = 1
    const line: Line = [
      [ax, ay],
      [bx, by],
    ]
    goOn(line)
    line.reverse()
    goOn(line)
    lines.push(line)
  })
  return lines
}

function lengthOf(line: Line): number {
  let length = 0
  for (let index = 1; index < line.length; index++)
    length += Math.hypot(line[index]![0] - line[index - 1]![0], line[index]![1] - line[index - 1]![1])
  return length
}

/** Ramer (1972), Douglas and Peucker (1973), without recursion. A closed line is cut at its first point and at the one farthest from it. */
function straighten(line: Line): Line {
  const keep = new Uint8Array(line.length)
  keep[0] = 1
  keep[line.length - 1] = 1
  const spans: [number, number][] = [[0, line.length - 1]]
  for (let span = spans.pop(); span !== undefined; span = spans.pop()) {
    const [from, to] = span
    let farthest = STRAIGHT
    let at = -1
    for (let index = from + 1; index < to; index++) {
      const off = distance(line[index]!, line[from]!, line[to]!)
      if (off > farthest) {
        farthest = off
        at = index
      }
    }
    if (at < 0) continue
    keep[at] = 1
    spans.push([from, at], [at, to])
  }
  return line.filter((_, index) => keep[index] === 1)
}

function distance([x, y]: [number, number], [ax, ay]: [number, number], [bx, by]: [number, number]): number {
  const dx = bx - ax
  const dy = by - ay
  const squared = dx * dx + dy * dy
  if (squared < 1e-12) return Math.hypot(x - ax, y - ay)
  const t = Math.min(1, Math.max(0, ((x - ax) * dx + (y - ay) * dy) / squared))
  return Math.hypot(x - ax - t * dx, y - ay - t * dy)
}

/** Tenths of a pixel as integers, so that relative steps add up without drift. */
function pathOf(line: Line): string {
  let x = Math.round(line[0]![0] * 10)
  let y = Math.round(line[0]![1] * 10)
  let path = `M${tenths(x)}${joined(tenths(y))}l`
  let first = true
  const last = line.at(-1)!
  const closes = line.length > 3 && keyOf(...last) === keyOf(...line[0]!)
  for (const [px, py] of closes ? line.slice(1, -1) : line.slice(1)) {
    const nextX = Math.round(px * 10)
    const nextY = Math.round(py * 10)
    if (nextX === x && nextY === y) continue
    const dx = tenths(nextX - x)
    path += (first ? dx : joined(dx)) + joined(tenths(nextY - y))
    first = false
    x = nextX
    y = nextY
  }
  if (first) return ''
  return closes ? `${path}z` : path
}

function tenths(value: number): string {
  const whole = Math.abs(value / 10).toString()
  return (value < 0 ? '-' : '') + (whole.startsWith('0.') ? whole.slice(1) : whole)
}

/** A minus sign parts two numbers by itself. */
function joined(number: string): string {
  return number.startsWith('-') ? number : ` ${number}`
}
