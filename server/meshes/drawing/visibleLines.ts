import { edgesOf, type Edges } from '../../../shared/lib/geometry/edgesOf'
import { facetNormals } from '../../../shared/lib/geometry/facetNormals'
import type { Mesh } from '../../../shared/lib/geometry/mesh'
import { SAMPLES, type DepthBuffer } from './depthBuffer'
import type { Projected } from './view'

/** A visible piece of an edge on the sheet, x and y of both ends, and whether something lies far behind it. */
export interface Stroke {
  ends: [number, number, number, number]
  outline: boolean
}

/** Facets that meet at more than this angle make a line; a cylinder of twelve sides is the coarsest that is taken for round. */
const CREASE_DEGREES = 32
/** Depth in pixels by which an edge may lie behind the surface that it belongs to, for rounding. */
const BIAS = 0.35
/** A step in depth of so many pixels on one side makes an outline. */
const STEP = 14
/** Hidden gaps shorter than this many pixels are closed: they come from single samples. */
const GAP = 1.2
/** Visible pieces shorter than this many pixels are dropped, unless the whole edge is that short. */
const STUB = 1.6

/**
 * The edges of a part that can be seen: where the surface turns away from the onlooker, bends sharply or ends.
 * Each is followed in half pixels and compared with the depth buffer's farthest value about the sample: nearest neighbours
 * belong to the surfaces on both sides of the edge, so an edge does not hide itself.
 */
export function visibleLines(part: Projected, buffer: DepthBuffer): Stroke[] {
  const strokes: Stroke[] = []
  const mesh = { positions: part.points, faces: part.faces }
  const edges = edgesOf(mesh)
  const normals = facetNormals(mesh)
  const sharp = Math.cos((CREASE_DEGREES * Math.PI) / 180)
  const skipsAway = isSolid(mesh, edges)
  for (let edge = 0; edge < edges.count; edge++) {
    const from = edges.starts[edge]!
    const side = edges.sides[from]!
    if (edges.starts[edge + 1]! - from === 2) {
      const one = Math.floor(side / 3) * 3
      const other = Math.floor(edges.sides[from + 1]! / 3) * 3
      const awayOne = normals[one + 2]! > 0
      const awayOther = normals[other + 2]! > 0
      const bend =
        normals[one]! * normals[other]! +
        normals[one + 1]! * normals[other + 1]! +
        normals[one + 2]! * normals[other + 2]!
      if (awayOne && awayOther && skipsAway) continue
      if (awayOne === awayOther && bend > sharp) continue
    }
    const start = part.faces[side]! * 3
    const end = part.faces[side % 3 === 2 ? side - 2 : side + 1]! * 3
    follow(part.points, start, end, buffer, strokes)
  }
  return strokes
}

/** Only of a closed solid whose facets look outwards can it be said that what looks away is hidden. */
function isSolid({ positions, faces }: Mesh, { count, starts }: Edges): boolean {
  for (let edge = 0; edge < count; edge++) if (starts[edge + 1]! - starts[edge]! !== 2) return false
  let sixfold = 0
  for (let corner = 0; corner < faces.length; corner += 3) {
    const a = faces[corner]! * 3
    const b = faces[corner + 1]! * 3
    const c = faces[corner + 2]! * 3
    sixfold +=
      positions[a]! * (positions[b + 1]! * positions[c + 2]! - positions[b + 2]! * positions[c + 1]!) +
      positions[a + 1]! * (positions[b + 2]! * positions[c]! - positions[b]! * positions[c + 2]!) +
      positions[a + 2]! * (positions[b]! * positions[c + 1]! - positions[b + 1]! * positions[c]!)
  }
  return sixfold > 0
}

/** Cuts an edge into its visible pieces. */
export function follow(
  points: ArrayLike<number>,
  start: number,
  end: number,
  buffer: DepthBuffer,
  strokes: Stroke[],
): void {
  const x = points[start]!
  const y = points[start + 1]!
  const z = points[start + 2]!
  const dx = points[end]! - x
  const dy = points[end + 1]! - y
  const dz = points[end + 2]! - z
  const length = Math.hypot(dx, dy)
  if (length < 1e-6) return
  const steps = Math.max(2, Math.ceil(length * SAMPLES))
  const runs: { from: number; to: number; steep: number }[] = []
  for (let step = 0; step < steps; step++) {
    const t = (step + 0.5) / steps
    const seen = look(buffer, x + dx * t, y + dy * t, z + dz * t, dx / length, dy / length)
    if (seen === 'hidden') continue
    const last = runs.at(-1)
    const steep = seen === 'outline' ? 1 : 0
    if (last !== undefined && ((step - last.to) * length) / steps <= GAP) {
      last.to = step + 1
      last.steep += steep
    } else runs.push({ from: step, to: step + 1, steep })
  }
  for (const { from, to, steep } of runs) {
    const whole = to - from === steps
    if (!whole && ((to - from) * length) / steps < STUB) continue
    // A run that reaches an end of the edge within a sample ends there, so that the next edge joins it.
    const begin = from <= 1 ? 0 : from / steps
    const finish = to >= steps - 1 ? 1 : to / steps
    strokes.push({
      ends: [x + dx * begin, y + dy * begin, x + dx * finish, y + dy * finish],
      outline: steep * 2 > to - from,
    })
  }
}

function look(
  buffer: DepthBuffer,
  x: number,
  y: number,
  z: number,
  alongX: number,
  alongY: number,
): 'hidden' | 'inner' | 'outline' {
  const column = Math.floor(x * SAMPLES)
  const row = Math.floor(y * SAMPLES)
  let farthest = -Infinity
  for (let dy = -1; dy <= 1; dy++) {
    for (let dx = -1; dx <= 1; dx++) farthest = Math.max(farthest, depthAt(buffer, column + dx, row + dy))
  }
  if (z > farthest + BIAS) return 'hidden'
  const reach = 2.5
  const oneSide = depthAt(buffer, Math.round(column - alongY * reach), Math.round(row + alongX * reach))
  const otherSide = depthAt(buffer, Math.round(column + alongY * reach), Math.round(row - alongX * reach))
  return Math.max(oneSide, otherSide) - z > STEP ? 'outline' : 'inner'
}

function depthAt(buffer: DepthBuffer, column: number, row: number): number {
  if (column < 0 || row < 0 || column >= buffer.width || row >= buffer.height) return Infinity
  return buffer.depth[row * buffer.width + column]!
}
