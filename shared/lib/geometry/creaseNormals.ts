import { facetNormals } from './facetNormals'
import type { Mesh } from './mesh'

/** Fans of more facets than this about one vertex are left flat: comparing each with each would take too long. */
const MOST_FACETS = 1024

/**
 * A normal for each corner of each facet, nine numbers a facet: the mean of the facets about that vertex that bend away from the
 * corner's own by less than `creaseDegrees`, weighed by their area. So round surfaces look round and edges stay sharp.
 * Cost O(corners × facets about a vertex).
 */
export function creaseNormals(mesh: Mesh, creaseDegrees: number): Float32Array {
  const { faces } = mesh
  const flat = facetNormals(mesh)
  const areas = facetAreas(mesh)
  const { starts, corners } = cornersByVertex(mesh)
  const least = Math.cos((creaseDegrees * Math.PI) / 180)
  const normals = new Float32Array(faces.length * 3)
  for (let corner = 0; corner < faces.length; corner++) {
    const own = Math.floor(corner / 3)
    const ownX = flat[own * 3]!
    const ownY = flat[own * 3 + 1]!
    const ownZ = flat[own * 3 + 2]!
    const from = starts[faces[corner]!]!
    const to = starts[faces[corner]! + 1]!
    let x = ownX * areas[own]!
    let y = ownY * areas[own]!
    let z = ownZ * areas[own]!
    if (to - from <= MOST_FACETS) {
      for (let place = from; place < to; place++) {
        const facet = Math.floor(corners[place]! / 3)
        if (facet === own) continue
        const otherX = flat[facet * 3]!
        const otherY = flat[facet * 3 + 1]!
        const otherZ = flat[facet * 3 + 2]!
        if (ownX * otherX + ownY * otherY + ownZ * otherZ < least) continue
        x += otherX * areas[facet]!
        y += otherY * areas[facet]!
        z += otherZ * areas[facet]!
      }
    }
    const length = Math.sqrt(x * x + y * y + z * z) || 1
    normals[corner * 3] = x / length
    normals[corner * 3 + 1] = y / length
    normals[corner * 3 + 2] = z / length
  }
  return normals
}

/** The corners at each vertex: those of vertex `v` are `corners[starts[v]]` to `corners[starts[v + 1]]`. */
function cornersByVertex({ positions, faces }: Mesh): { starts: Uint32Array; corners: Uint32Array } {
  const starts = new Uint32Array(positions.length / 3 + 1)
  for (let corner = 0; corner < faces.length; corner++) starts[faces[corner]! + 1]!++
  for (let vertex = 1; vertex < starts.length; vertex++) starts[vertex]! += starts[vertex - 1]!
  const next = starts.slice()
  const corners = new Uint32Array(faces.length)
  for (let corner = 0; corner < faces.length; corner++) corners[next[faces[corner]!]!++] = corner
  return { starts, corners }
}

function facetAreas({ positions, faces }: Mesh): Float32Array {
  const areas = new Float32Array(faces.length / 3)
  for (let facet = 0; facet < areas.length; facet++) {
    const a = faces[facet * 3]! * 3
    const b = faces[facet * 3 + 1]! * 3
    const c = faces[facet * 3 + 2]! * 3
    const ux = positions[b]! - positions[a]!
    const uy = positions[b + 1]! - positions[a + 1]!
    const uz = positions[b + 2]! - positions[a + 2]!
    const vx = positions[c]! - positions[a]!
    const vy = positions[c + 1]! - positions[a + 1]!
    const vz = positions[c + 2]! - positions[a + 2]!
    areas[facet] = Math.hypot(uy * vz - uz * vy, uz * vx - ux * vz, ux * vy - uy * vx) / 2
  }
  return areas
}
