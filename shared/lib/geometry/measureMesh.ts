import { edgesOf, type Edges } from './edgesOf'
import type { Mesh } from './mesh'

/** What a mesh measures, in its own unit of length, and what is wrong with it. */
export interface MeshMeasures {
  triangles: number
  /** Area of all facets. */
  area: number
  /** Enclosed volume; negative for a mesh turned inside out. It means nothing unless `closed`. */
  volume: number
  /** Corners of the box along the axes. */
  box: { min: [number, number, number]; max: [number, number, number] }
  /** Centre of mass of the enclosed volume; the middle of the box when there is none. */
  centre: [number, number, number]
  /** Edges with one facet. */
  openEdges: number
  /** Facets that have an open edge: how some other programs count the same defect. */
  openFacets: number
  /** Edges whose two facets run along it in the same direction, so that one of them is turned. */
  backwardsEdges: number
  /** Edges with three facets or more. */
  nonManifoldEdges: number
  /** Facets without area: two corners at one place, or three on one line. */
  degenerateFacets: number
  /** Pieces that share no edge. A hollow ball has two. */
  shells: number
  /** Each edge is passed as often one way as the other: then, and only then, the surface encloses its volume. */
  closed: boolean
}

/**
 * Measures a welded mesh (`weld`), without mending anything.
 * Sums are kept in doubles about the middle of the box, because far from the origin large terms would cancel and cost digits.
 * @throws RangeError for an index without a vertex, which is a programmer's error. Cost as `edgesOf`.
 * Source: divergence theorem over tetrahedra, as in Mirtich (1996).
 */
export function measureMesh(mesh: Mesh): MeshMeasures {
  const index = highest(mesh.faces)
  if (mesh.faces.length > 0 && index * 3 >= mesh.positions.length)
    throw new RangeError(`Index ${index} of ${mesh.positions.length / 3} vertices`)
  const box = boxOf(mesh)
  const edges = edgesOf(mesh)
  return {
    triangles: mesh.faces.length / 3,
    box,
    ...sumFacets(mesh, middleOf(box)),
    ...judgeEdges(mesh, edges),
  }
}

/** The box along the axes about all vertices; all zero for a mesh without any. */
export function boxOf({ positions }: Mesh): MeshMeasures['box'] {
  if (positions.length === 0) return { min: [0, 0, 0], max: [0, 0, 0] }
  const min: [number, number, number] = [Infinity, Infinity, Infinity]
  const max: [number, number, number] = [-Infinity, -Infinity, -Infinity]
  for (let index = 0; index < positions.length; index += 3) {
    for (let axis = 0; axis < 3; axis++) {
      const value = positions[index + axis]!
      if (value < min[axis]!) min[axis] = value
      if (value > max[axis]!) max[axis] = value
    }
  }
  return { min, max }
}

/** The length of the box's diagonal. */
export function diagonalOf({ min, max }: MeshMeasures['box']): number {
  return Math.hypot(max[0] - min[0], max[1] - min[1], max[2] - min[2])
}

function middleOf({ min, max }: MeshMeasures['box']): [number, number, number] {
  return [(min[0] + max[0]) / 2, (min[1] + max[1]) / 2, (min[2] + max[2]) / 2]
}

function highest(faces: Uint32Array): number {
  let most = 0
  for (let corner = 0; corner < faces.length; corner++) if (faces[corner]! > most) most = faces[corner]!
  return most
}

function sumFacets({ positions, faces }: Mesh, middle: [number, number, number]) {
  const [mx, my, mz] = middle
  let doubleArea = 0
  let sixfold = 0
  let cx = 0
  let cy = 0
  let cz = 0
  let flat = 0
  for (let corner = 0; corner < faces.length; corner += 3) {
    const a = faces[corner]! * 3
    const b = faces[corner + 1]! * 3
    const c = faces[corner + 2]! * 3
    const ax = positions[a]! - mx
    const ay = positions[a + 1]! - my
    const az = positions[a + 2]! - mz
    const bx = positions[b]! - mx
    const by = positions[b + 1]! - my
    const bz = positions[b + 2]! - mz
    const qx = positions[c]! - mx
    const qy = positions[c + 1]! - my
    const qz = positions[c + 2]! - mz
    const nx = (by - ay) * (qz - az) - (bz - az) * (qy - ay)
    const ny = (bz - az) * (qx - ax) - (bx - ax) * (qz - az)
    const nz = (bx - ax) * (qy - ay) - (by - ay) * (qx - ax)
    const twice = Math.sqrt(nx * nx + ny * ny + nz * nz)
    if (twice === 0) flat++
    doubleArea += twice
    const six = ax * nx + ay * ny + az * nz
    sixfold += six
    cx += six * (ax + bx + qx)
    cy += six * (ay + by + qy)
    cz += six * (az + bz + qz)
  }
  const centre: [number, number, number] =
    sixfold === 0 ? [mx, my, mz] : [mx + cx / (4 * sixfold), my + cy / (4 * sixfold), mz + cz / (4 * sixfold)]
  return { area: doubleArea / 2, volume: sixfold / 6, centre, degenerateFacets: flat }
}

function judgeEdges({ faces }: Mesh, { count, starts, sides, forward, collapsed }: Edges) {
  let openEdges = 0
  let backwardsEdges = 0
  let nonManifoldEdges = 0
  let closed = faces.length > 0
  const facets = faces.length / 3
  const open = new Uint8Array(facets)
  const pieces = new Pieces(facets)
  for (let edge = 0; edge < count; edge++) {
    const from = starts[edge]!
    const to = starts[edge + 1]!
    let along = 0
    for (let index = from; index < to; index++) along += forward[index]!
    if (along * 2 !== to - from) closed = false
    const first = Math.floor(sides[from]! / 3)
    if (to - from === 1) {
      openEdges++
      open[first] = 1
      continue
    }
    if (to - from > 2) nonManifoldEdges++
    else if (along !== 1) backwardsEdges++
    for (let index = from + 1; index < to; index++) pieces.join(first, Math.floor(sides[index]! / 3))
  }
  let openFacets = 0
  for (let facet = 0; facet < facets; facet++) openFacets += open[facet]!
  // Collapsed facets take part in no edge, so each would count as a piece of its own.
  return { openEdges, openFacets, backwardsEdges, nonManifoldEdges, shells: pieces.count - collapsed, closed }
}

/** Union-find with path halving, after Tarjan and van Leeuwen (1984). */
class Pieces {
  private readonly parents: Int32Array
  count: number

  constructor(size: number) {
    this.parents = new Int32Array(size)
    for (let index = 0; index < size; index++) this.parents[index] = index
    this.count = size
  }

  join(one: number, other: number): void {
    const a = this.root(one)
    const b = this.root(other)
    if (a === b) return
    // The lower number becomes the root: neighbours in a file lie near each other, so paths stay short without ranks.
    if (a < b) this.parents[b] = a
    else this.parents[a] = b
    this.count--
  }

  private root(index: number): number {
    const { parents } = this
    while (parents[index] !== index) {
      parents[index] = parents[parents[index]!]!
      index = parents[index]!
    }
    return index
  }
}
