import type { Projection } from './view'

/** Samples a pixel of the sheet in each direction: lines are found to half a pixel. */
export const SAMPLES = 2
export const NO_PART = 0xffff

/** What is nearest to the onlooker at each sample of the sheet. */
export interface DepthBuffer {
  readonly width: number
  readonly height: number
  /** Infinity where there is nothing. */
  readonly depth: Float32Array
  /** The part's number, `NO_PART` where there is nothing. */
  readonly part: Uint16Array
}

/** Draws all facets into a depth buffer, from both sides, so that open surfaces hide what is behind them too. */
export function depthBufferOf(projection: Projection): DepthBuffer {
  const width = projection.width * SAMPLES
  const height = projection.height * SAMPLES
  const buffer = {
    width,
    height,
    depth: new Float32Array(width * height).fill(Infinity),
    part: new Uint16Array(width * height).fill(NO_PART),
  }
  projection.parts.forEach(({ points, faces }, part) => {
    for (let corner = 0; corner < faces.length; corner += 3) {
      fillFacet(buffer, points, part, faces[corner]! * 3, faces[corner + 1]! * 3, faces[corner + 2]! * 3)
    }
  })
  return buffer
}

function fillFacet(buffer: DepthBuffer, points: Float64Array, part: number, a: number, b: number, c: number) {
  const ax = points[a]! * SAMPLES
  const ay = points[a + 1]! * SAMPLES
  const bx = points[b]! * SAMPLES
  const by = points[b + 1]! * SAMPLES
  const cx = points[c]! * SAMPLES
  const cy = points[c + 1]! * SAMPLES
  const area = (bx - ax) * (cy - ay) - (by - ay) * (cx - ax)
  if (area === 0) return
  const az = points[a + 2]!
  const slopeB = (points[b + 2]! - az) / area
  const slopeC = (points[c + 2]! - az) / area
  const fromY = Math.max(0, Math.ceil(Math.min(ay, by, cy) - 0.5))
  const toY = Math.min(buffer.height - 1, Math.floor(Math.max(ay, by, cy) - 0.5))
  const fromX = Math.max(0, Math.ceil(Math.min(ax, bx, cx) - 0.5))
  const toX = Math.min(buffer.width - 1, Math.floor(Math.max(ax, bx, cx) - 0.5))
  // Each weight changes by a constant along a row and is positive inside, so it bounds the row's samples on one side. Facets of
  // rods and pipes are long slivers: trying each sample of their box took most of the time.
  const sign = area > 0 ? 1 : -1
  const acrossB = (cy - ay) * sign
  const acrossC = -(by - ay) * sign
  const whole = area * sign
  const { depth, part: parts, width } = buffer
  for (let y = fromY; y <= toY; y++) {
    const px = fromX + 0.5 - ax
    const py = y + 0.5 - ay
    const firstB = (px * (cy - ay) - py * (cx - ax)) * sign
    const firstC = ((bx - ax) * py - (by - ay) * px) * sign
    const range = { from: 0, to: toX - fromX }
    narrow(range, firstB, acrossB)
    narrow(range, firstC, acrossC)
    narrow(range, whole - firstB - firstC, -acrossB - acrossC)
    for (let step = range.from; step <= range.to; step++) {
      const z = az + (slopeB * (firstB + acrossB * step) + slopeC * (firstC + acrossC * step)) * sign
      const index = y * width + fromX + step
      if (z < depth[index]!) {
        depth[index] = z
        parts[index] = part
      }
    }
  }
}

/** Keeps the steps at which `first + across * step` is not negative. */
function narrow(range: { from: number; to: number }, first: number, across: number): void {
  if (across > 0) range.from = Math.max(range.from, Math.ceil(-first / across - 1e-9))
  else if (across < 0) range.to = Math.min(range.to, Math.floor(-first / across + 1e-9))
  else if (first < 0) range.to = -1
}
