import type { Mesh } from '../../shared/lib/geometry/mesh'
import { Surface } from './surface'

/** Points that are asked about on each surface. More of them found the same deviation to two digits on the bench's meshes. */
const MOST_POINTS = 150_000

/**
 * How far two surfaces lie apart at most, in the mesh's unit: the greater of both directions (Hausdorff), taken at the vertices of
 * the first and at vertices, middles of sides and middles of facets of the second, evenly thinned to 150,000 points each.
 */
export function deviation(original: Mesh, simplified: Mesh): number {
  const there = farthest(original.positions, new Surface(simplified))
  const back = farthest(pointsOf(simplified), new Surface(original))
  return Math.sqrt(Math.max(there, back))
}

function farthest(points: ArrayLike<number>, surface: Surface): number {
  const count = points.length / 3
  const step = Math.max(1, Math.ceil(count / MOST_POINTS))
  let most = 0
  for (let point = 0; point < count; point += step) {
    const at = point * 3
    most = Math.max(most, surface.distanceSquared(points[at]!, points[at + 1]!, points[at + 2]!, most))
  }
  return most
}

function pointsOf({ positions, faces }: Mesh): Float64Array {
  const facets = faces.length / 3
  const points = new Float64Array(positions.length + facets * 12)
  points.set(positions)
  let to = positions.length
  for (let facet = 0; facet < facets; facet++) {
    const [a, b, c] = [faces[facet * 3]! * 3, faces[facet * 3 + 1]! * 3, faces[facet * 3 + 2]! * 3]
    for (let axis = 0; axis < 3; axis++) {
      const [p, q, r] = [positions[a + axis]!, positions[b + axis]!, positions[c + axis]!]
      points[to + axis] = (p + q) / 2
      points[to + 3 + axis] = (q + r) / 2
      points[to + 6 + axis] = (r + p) / 2
      points[to + 9 + axis] = (p + q + r) / 3
    }
    to += 12
  }
  return points
}
