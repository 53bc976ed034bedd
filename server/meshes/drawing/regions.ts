import { NO_PART, SAMPLES, type DepthBuffer } from './depthBuffer'

/**
 * For each sample its distance, in pixels of the sheet, to the nearest sample that shows something else.
 * Two passes with steps of 1 and √2 (Borgefors 1986): a few per cent off, which is enough to stand away from an edge.
 */
export function depthInside({ width, height, part }: DepthBuffer): Float32Array {
  const far = new Float32Array(width * height).fill(Infinity)
  const forth = [-1, -width, -width - 1, -width + 1]
  const back = [1, width, width + 1, width - 1]
  sweep(far, part, width, height, forth)
  sweep(far, part, width, height, back)
  for (let index = 0; index < far.length; index++) far[index]! /= SAMPLES
  return far
}

/** One pass: each sample is as far from an edge as its nearest neighbour that came before it, and a step more. */
function sweep(
  far: Float32Array,
  part: Uint16Array,
  width: number,
  height: number,
  neighbours: readonly number[],
): void {
  const onward = neighbours[0]! < 0
  for (let count = 0; count < far.length; count++) {
    const index = onward ? count : far.length - 1 - count
    const x = index % width
    let least = far[index]!
    if (x === 0 || x === width - 1 || index < width || index >= width * (height - 1)) least = 0.5
    else {
      for (let turn = 0; turn < 4; turn++) {
        const neighbour = index + neighbours[turn]!
        const step = turn < 2 ? 1 : Math.SQRT2
        const reach = part[neighbour] === part[index] ? far[neighbour]! + step : step / 2
        if (reach < least) least = reach
      }
    }
    far[index] = least
  }
}

/**
 * A point of the sheet well inside the visible surface of a part, so that a leader's dot stands on it; undefined where the part is
 * hidden. Of the points that lie deep enough it takes the one nearest to the middle of what is seen.
 */
export function pointOn(
  { width, part }: DepthBuffer,
  inside: Float32Array,
  numbers: ReadonlySet<number>,
): { x: number; y: number } | undefined {
  const wanted = new Uint8Array(NO_PART + 1)
  for (const number of numbers) wanted[number] = 1
  const seen: number[] = []
  let deepest = 0
  let sumX = 0
  let sumY = 0
  // Every third sample is enough: a dot is wider than that.
  for (let index = 0; index < part.length; index += 3) {
    if (wanted[part[index]!] === 0) continue
    seen.push(index)
    sumX += index % width
    sumY += Math.floor(index / width)
    if (inside[index]! > deepest) deepest = inside[index]!
  }
  const middle = { x: sumX / seen.length, y: sumY / seen.length }
  const enough = Math.min(deepest * 0.7, DEEP)
  let best: { x: number; y: number } | undefined
  let nearest = Infinity
  for (const index of seen) {
    if (inside[index]! < enough) continue
    const x = index % width
    const y = Math.floor(index / width)
    const away = (x - middle.x) ** 2 + (y - middle.y) ** 2
    if (away < nearest) {
      nearest = away
      best = { x: (x + 0.5) / SAMPLES, y: (y + 0.5) / SAMPLES }
    }
  }
  return best
}

/** So many pixels from the edge, a dot plainly stands on its part. */
const DEEP = 9
/** Half the room that a balloon needs, in pixels of the sheet: 27 px on a desk, where the sheet is shown at its own size. */
const BALLOON = 17
/** Balloons stand at least so far from each other. */
const APART = 46
const BORDER = 16
const LONGEST = 170

/**
 * A place for each anchor's balloon: on empty paper, near its anchor, clear of other balloons and leaders.
 * Anchors are served from the left to the right. Where all is full, the least bad place is taken.
 */
export function placeBalloons(
  buffer: DepthBuffer,
  inside: Float32Array,
  anchors: Readonly<Record<string, { x: number; y: number }>>,
): Record<string, { x: number; y: number }> {
  const sheet = { width: buffer.width / SAMPLES, height: buffer.height / SAMPLES }
  const placed: { at: Point; tip: Point }[] = []
  const places: Record<string, { x: number; y: number }> = {}
  const order = Object.entries(anchors).sort(([, a], [, b]) => a.x - b.x || a.y - b.y)
  for (const [name, tip] of order) {
    let best: Point = tip
    let least = Infinity
    for (let turn = 0; turn < 48; turn++) {
      const angle = (turn / 48) * 2 * Math.PI
      for (let reach = 34; reach <= LONGEST; reach += 8) {
        const at = { x: tip.x + reach * Math.cos(angle), y: tip.y + reach * Math.sin(angle) }
        if (at.x < BORDER || at.y < BORDER || at.x > sheet.width - BORDER || at.y > sheet.height - BORDER)
          break
        const cost = reach + trouble(buffer, inside, at, tip, placed)
        if (cost < least) {
          least = cost
          best = at
        }
      }
    }
    placed.push({ at: best, tip })
    places[name] = best
  }
  return places
}

interface Point {
  x: number
  y: number
}

function trouble(
  buffer: DepthBuffer,
  inside: Float32Array,
  at: Point,
  tip: Point,
  placed: readonly { at: Point; tip: Point }[],
): number {
  const index = Math.floor(at.y * SAMPLES) * buffer.width + Math.floor(at.x * SAMPLES)
  // On empty paper `inside` is the distance to the nearest line or border of the sheet.
  const empty = buffer.part[index] === NO_PART
  let cost = empty ? Math.max(0, BALLOON - inside[index]!) * 6 : 160
  // Leaders at 30 to 60 degrees stand out from the horizontal and upright lines of machines.
  const slope = Math.abs(Math.atan2(Math.abs(at.y - tip.y), Math.abs(at.x - tip.x)) - Math.PI / 4)
  cost += slope * 12
  for (const other of placed) {
    const gap = Math.hypot(at.x - other.at.x, at.y - other.at.y)
    if (gap < APART) cost += (APART - gap) * 14
    if (distanceToLeader(at, other) < BALLOON + 4) cost += 120
    if (distanceToLeader(other.at, { at, tip }) < BALLOON + 4) cost += 120
    if (crosses({ at, tip }, other)) cost += 150
  }
  return cost
}

function distanceToLeader(point: Point, { at, tip }: { at: Point; tip: Point }): number {
  const dx = tip.x - at.x
  const dy = tip.y - at.y
  const t = Math.min(
    1,
    Math.max(0, ((point.x - at.x) * dx + (point.y - at.y) * dy) / (dx * dx + dy * dy || 1)),
  )
  return Math.hypot(point.x - at.x - t * dx, point.y - at.y - t * dy)
}

function crosses(one: { at: Point; tip: Point }, other: { at: Point; tip: Point }): boolean {
  const side = (a: Point, b: Point, c: Point): number => (b.x - a.x) * (c.y - a.y) - (b.y - a.y) * (c.x - a.x)
  return (
    side(one.at, one.tip, other.at) * side(one.at, one.tip, other.tip) < 0 &&
    side(other.at, other.tip, one.at) * side(other.at, other.tip, one.tip) < 0
  )
}
