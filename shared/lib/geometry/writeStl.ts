import type { Mesh } from './mesh'
import { STL_FACET_BYTES, STL_HEADER_BYTES } from './stl'

/**
 * A mesh as binary STL, with the normals that its corners imply (0, 0, 0 for a facet without area). Coordinates are rounded to
 * single precision, which is all that the format holds. `title` stands in the header: ASCII, at most 80 bytes, and it must not
 * begin with "solid", which would make it look like a text.
 */
export function writeStl(mesh: Mesh, title = 'binary STL'): Uint8Array<ArrayBuffer> {
  const facets = mesh.faces.length / 3
  const bytes = new Uint8Array(STL_HEADER_BYTES + facets * STL_FACET_BYTES)
  const view = new DataView(bytes.buffer)
  bytes.set(new TextEncoder().encode(title).subarray(0, 80))
  view.setUint32(80, facets, true)
  for (let facet = 0; facet < facets; facet++) writeFacet(view, mesh, facet)
  return bytes
}

function writeFacet(view: DataView, { positions, faces }: Mesh, facet: number): void {
  const corners = [0, 1, 2].map((corner) => {
    const vertex = faces[facet * 3 + corner]! * 3
    return [positions[vertex]!, positions[vertex + 1]!, positions[vertex + 2]!] as const
  })
  const [a, b, c] = corners as [Corner, Corner, Corner]
  const x = (b[1] - a[1]) * (c[2] - a[2]) - (b[2] - a[2]) * (c[1] - a[1])
  const y = (b[2] - a[2]) * (c[0] - a[0]) - (b[0] - a[0]) * (c[2] - a[2])
  const z = (b[0] - a[0]) * (c[1] - a[1]) - (b[1] - a[1]) * (c[0] - a[0])
  const length = Math.hypot(x, y, z) || 1
  let at = STL_HEADER_BYTES + facet * STL_FACET_BYTES
  for (const value of [x / length, y / length, z / length, ...a, ...b, ...c]) {
    view.setFloat32(at, value, true)
    at += 4
  }
}

type Corner = readonly [number, number, number]
