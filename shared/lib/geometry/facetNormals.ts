import type { Mesh } from './mesh'

/** The outward unit normal of each facet, three numbers each; 0, 0, 0 for a facet without area. Cost O(facets). */
export function facetNormals({ positions, faces }: Mesh): Float32Array {
  const normals = new Float32Array(faces.length)
  for (let corner = 0; corner < faces.length; corner += 3) {
    const a = faces[corner]! * 3
    const b = faces[corner + 1]! * 3
    const c = faces[corner + 2]! * 3
    const ux = positions[b]! - positions[a]!
    const uy = positions[b + 1]! - positions[a + 1]!
    const uz = positions[b + 2]! - positions[a + 2]!
    const vx = positions[c]! - positions[a]!
    const vy = positions[c + 1]! - positions[a + 1]!
    const vz = positions[c + 2]! - positions[a + 2]!
    const x = uy * vz - uz * vy
    const y = uz * vx - ux * vz
    const z = ux * vy - uy * vx
    const length = Math.sqrt(x * x + y * y + z * z)
    if (length === 0) continue
    normals[corner] = x / length
    normals[corner + 1] = y / length
    normals[corner + 2] = z / length
  }
  return normals
}
