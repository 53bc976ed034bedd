/** A binary STL of so many facets, all of them different. `promised` is what its head says. */
export function binaryStl(facets: number, promised = facets): Uint8Array<ArrayBuffer> {
  const bytes = new Uint8Array(84 + facets * 50)
  const view = new DataView(bytes.buffer)
  view.setUint32(80, promised, true)
  for (let facet = 0; facet < facets; facet += 1) {
    const at = 84 + facet * 50 + 12
    const corners = [facet, 0, 0, facet + 1, 0, 0, facet, 1, 0]
    corners.forEach((value, index) => view.setFloat32(at + index * 4, value, true))
  }
  return bytes
}

type Corner = [number, number, number]
/** A cube of this edge: twelve facets, closed, outward. */
export function cubeStl(edge: number): Uint8Array<ArrayBuffer> {
  const corner = (index: number): Corner => [
    (index & 1) * edge,
    ((index >> 1) & 1) * edge,
    (index >> 2) * edge,
  ]
  const faces = [
    [0, 2, 3, 1],
    [4, 5, 7, 6],
    [0, 1, 5, 4],
    [2, 6, 7, 3],
    [0, 4, 6, 2],
    [1, 3, 7, 5],
  ]
  const triangles = faces.flatMap(([a, b, c, d]) => [
    [a!, b!, c!],
    [a!, c!, d!],
  ])
  const bytes = new Uint8Array(84 + triangles.length * 50)
  const view = new DataView(bytes.buffer)
  view.setUint32(80, triangles.length, true)
  triangles.forEach((triangle, facet) => {
    triangle
      .flatMap(corner)
      .forEach((value, index) => view.setFloat32(84 + facet * 50 + 12 + index * 4, value, true))
  })
  return bytes
}
