import { edgesOf } from './edgesOf'
import { facetNormals } from './facetNormals'
import type { Mesh } from './mesh'

/**
 * The edges that a drawing would show from every side: where facets meet at `creaseDegrees` or more, and where the surface ends
 * or is not manifold. Two vertex numbers an edge. Cost as `edgesOf`.
 */
export function featureEdges(mesh: Mesh, creaseDegrees: number): Uint32Array {
  const { count, starts, sides } = edgesOf(mesh)
  const normals = facetNormals(mesh)
  const sharp = Math.cos((creaseDegrees * Math.PI) / 180)
  const found: number[] = []
  for (let edge = 0; edge < count; edge++) {
    const from = starts[edge]!
    const side = sides[from]!
    if (starts[edge + 1]! - from === 2) {
      const one = Math.floor(side / 3) * 3
      const other = Math.floor(sides[from + 1]! / 3) * 3
      const bend =
        normals[one]! * normals[other]! +
        normals[one + 1]! * normals[other + 1]! +
        normals[one + 2]! * normals[other + 2]!
      if (bend > sharp) continue
    }
    found.push(mesh.faces[side]!, mesh.faces[side % 3 === 2 ? side - 2 : side + 1]!)
  }
  return Uint32Array.from(found)
}
