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
  // The three weights change by a constant from one sample to the next; with the sign of the area they are positive inside.
  const sign = area > 0 ? 1 : -1
  const acrossB = (cy - ay) * sign
  const acrossC = -(by - ay) * sign
  const { depth, part: parts, width } = buffer
  for (let y = fromY; y <= toY; y++) {
    const px = fromX + 0.5 - ax
    const py = y + 0.5 - ay
    let weightB = (px * (cy - ay) - py * (cx - ax)) * sign
    let weightC = ((bx - ax) * py - (by - ay) * px) * sign
    for (let index = y * width + fromX; index <= y * width + toX; index++) {
      if (weightB >= 0 && weightC >= 0 && weightB + weightC <= area * sign) {
        const z = az + (slopeB * weightB + slopeC * weightC) * sign
        if (z < depth[index]!) {
          depth[index] = z
          parts[index] = part
        }
      }
      weightB += acrossB
      weightC += acrossC
    }
  }
}
