import type { Mesh } from '../../shared/lib/geometry/mesh'

const LEAF = 8
const BITS = 10

/**
 * A tree of boxes over the facets of a mesh, to ask how far a point lies from its surface.
 * Facets are sorted along a Morton curve and cut into leaves of eight; the boxes above them form a complete binary tree in one
 * array, so that building costs a sort and one sweep (after Lauterbach and others, 2009).
 */
export class Surface {
  private readonly order: Uint32Array
  private readonly boxes: Float64Array
  private readonly leaves: number
  private readonly stack: number[] = []

  constructor(private readonly mesh: Mesh) {
    this.order = mortonOrder(mesh)
    const blocks = Math.max(1, Math.ceil(this.order.length / LEAF))
    this.leaves = 2 ** Math.ceil(Math.log2(blocks))
    this.boxes = this.build(blocks)
  }

  /**
   * The squared distance from a point to the surface. Once a facet at `enough` (squared) or nearer has been found, that one's
   * distance is given back without looking for a nearer one: for a maximum over many points no more is needed.
   */
  distanceSquared(x: number, y: number, z: number, enough = 0): number {
    const { boxes, stack, leaves } = this
    let best = Infinity
    stack.length = 0
    stack.push(1)
    while (stack.length > 0) {
      const node = stack.pop()!
      if (boxDistance(boxes, node, x, y, z) >= best) continue
      if (node >= leaves) {
        best = Math.min(best, this.leafDistance(node - leaves, x, y, z))
        if (best <= enough) return best
        continue
      }
      const left = boxDistance(boxes, node * 2, x, y, z)
      const right = boxDistance(boxes, node * 2 + 1, x, y, z)
      // The nearer child lies on top of the stack.
      if (left < right) stack.push(node * 2 + 1, node * 2)
      else stack.push(node * 2, node * 2 + 1)
    }
    return best
  }

  private leafDistance(leaf: number, x: number, y: number, z: number): number {
    let best = Infinity
    const end = Math.min(this.order.length, (leaf + 1) * LEAF)
    for (let place = leaf * LEAF; place < end; place++) {
      // A facet without area may give NaN, which is nearer than nothing; its corners belong to its neighbours as well.
      const distance = facetDistance(this.mesh, this.order[place]!, x, y, z)
      if (distance < best) best = distance
    }
    return best
  }

  private build(blocks: number): Float64Array {
    const boxes = new Float64Array(this.leaves * 12)
    for (let node = 0; node < this.leaves * 2; node++) {
      boxes.fill(Infinity, node * 6, node * 6 + 3)
      boxes.fill(-Infinity, node * 6 + 3, node * 6 + 6)
    }
    const { positions, faces } = this.mesh
    for (let block = 0; block < blocks; block++) {
      const box = (this.leaves + block) * 6
      for (let place = block * LEAF; place < Math.min(this.order.length, (block + 1) * LEAF); place++) {
        for (let corner = 0; corner < 3; corner++) {
          const vertex = faces[this.order[place]! * 3 + corner]! * 3
          for (let axis = 0; axis < 3; axis++) {
            const value = positions[vertex + axis]!
            if (value < boxes[box + axis]!) boxes[box + axis] = value
            if (value > boxes[box + 3 + axis]!) boxes[box + 3 + axis] = value
          }
        }
      }
    }
    for (let node = this.leaves - 1; node > 0; node--) {
      for (let axis = 0; axis < 3; axis++) {
        boxes[node * 6 + axis] = Math.min(boxes[node * 12 + axis]!, boxes[node * 12 + 6 + axis]!)
        boxes[node * 6 + 3 + axis] = Math.max(boxes[node * 12 + 3 + axis]!, boxes[node * 12 + 9 + axis]!)
      }
    }
    return boxes
  }
}

/** Squared distance to a box; Infinity for an empty one. */
function boxDistance(boxes: Float64Array, node: number, x: number, y: number, z: number): number {
  const at = node * 6
  const dx = Math.max(boxes[at]! - x, 0, x - boxes[at + 3]!)
  const dy = Math.max(boxes[at + 1]! - y, 0, y - boxes[at + 4]!)
  const dz = Math.max(boxes[at + 2]! - z, 0, z - boxes[at + 5]!)
  return dx * dx + dy * dy + dz * dz
}

/** Squared distance from a point to a triangle. Source: Ericson, Real-Time Collision Detection (2005), 5.1.5. */
function facetDistance({ positions, faces }: Mesh, facet: number, x: number, y: number, z: number): number {
  const a = faces[facet * 3]! * 3
  const b = faces[facet * 3 + 1]! * 3
  const c = faces[facet * 3 + 2]! * 3
  const abx = positions[b]! - positions[a]!
  const aby = positions[b + 1]! - positions[a + 1]!
  const abz = positions[b + 2]! - positions[a + 2]!
  const acx = positions[c]! - positions[a]!
  const acy = positions[c + 1]! - positions[a + 1]!
  const acz = positions[c + 2]! - positions[a + 2]!
  const apx = x - positions[a]!
  const apy = y - positions[a + 1]!
  const apz = z - positions[a + 2]!
  const d1 = abx * apx + aby * apy + abz * apz
  const d2 = acx * apx + acy * apy + acz * apz
  if (d1 <= 0 && d2 <= 0) return apx * apx + apy * apy + apz * apz
  const bpx = apx - abx
  const bpy = apy - aby
  const bpz = apz - abz
  const d3 = abx * bpx + aby * bpy + abz * bpz
  const d4 = acx * bpx + acy * bpy + acz * bpz
  if (d3 >= 0 && d4 <= d3) return bpx * bpx + bpy * bpy + bpz * bpz
  const vc = d1 * d4 - d3 * d2
  if (vc <= 0 && d1 >= 0 && d3 <= 0) return offset(apx, apy, apz, abx, aby, abz, d1 / (d1 - d3), 0, 0, 0, 0)
  const cpx = apx - acx
  const cpy = apy - acy
  const cpz = apz - acz
  const d5 = abx * cpx + aby * cpy + abz * cpz
  const d6 = acx * cpx + acy * cpy + acz * cpz
  if (d6 >= 0 && d5 <= d6) return cpx * cpx + cpy * cpy + cpz * cpz
  const vb = d5 * d2 - d1 * d6
  if (vb <= 0 && d2 >= 0 && d6 <= 0) return offset(apx, apy, apz, acx, acy, acz, d2 / (d2 - d6), 0, 0, 0, 0)
  const va = d3 * d6 - d5 * d4
  if (va <= 0 && d4 - d3 >= 0 && d5 - d6 >= 0) {
    const w = (d4 - d3) / (d4 - d3 + (d5 - d6))
    return offset(bpx, bpy, bpz, acx - abx, acy - aby, acz - abz, w, 0, 0, 0, 0)
  }
  const whole = va + vb + vc
  return offset(apx, apy, apz, abx, aby, abz, vb / whole, acx, acy, acz, vc / whole)
}

/** |p - s u - t v|². */
function offset(
  px: number,
  py: number,
  pz: number,
  ux: number,
  uy: number,
  uz: number,
  s: number,
  vx: number,
  vy: number,
  vz: number,
  t: number,
): number {
  const x = px - ux * s - vx * t
  const y = py - uy * s - vy * t
  const z = pz - uz * s - vz * t
  return x * x + y * y + z * z
}

/** Facets along a space-filling curve through their middles: 10 bits an axis, sorted by two passes of 15 bits. */
function mortonOrder({ positions, faces }: Mesh): Uint32Array {
  const facets = faces.length / 3
  const min = [Infinity, Infinity, Infinity]
  const max = [-Infinity, -Infinity, -Infinity]
  for (let index = 0; index < positions.length; index++) {
    const axis = index % 3
    if (positions[index]! < min[axis]!) min[axis] = positions[index]!
    if (positions[index]! > max[axis]!) max[axis] = positions[index]!
  }
  const scale = min.map((low, axis) => (2 ** BITS - 1) / (3 * (max[axis]! - low) || 1))
  const codes = new Uint32Array(facets)
  for (let facet = 0; facet < facets; facet++) {
    let code = 0
    for (let axis = 0; axis < 3; axis++) {
      let sum = -3 * min[axis]!
      for (let corner = 0; corner < 3; corner++) sum += positions[faces[facet * 3 + corner]! * 3 + axis]!
      code |= spread(Math.max(0, Math.floor(sum * scale[axis]!))) << axis
    }
    codes[facet] = code
  }
  let order = Uint32Array.from({ length: facets }, (_, facet) => facet)
  for (const shift of [0, 15]) {
    const counts = new Uint32Array(2 ** 15 + 1)
    for (let facet = 0; facet < facets; facet++) counts[((codes[facet]! >>> shift) & 0x7fff) + 1]!++
    for (let bucket = 0; bucket < 2 ** 15; bucket++) counts[bucket + 1]! += counts[bucket]!
    const sorted = new Uint32Array(facets)
    for (const facet of order) sorted[counts[(codes[facet]! >>> shift) & 0x7fff]!++] = facet
    order = sorted
  }
  return order
}

/** Two zero bits between each of ten. */
function spread(value: number): number {
  let bits = value & 0x3ff
  bits = (bits | (bits << 16)) & 0x30000ff
  bits = (bits | (bits << 8)) & 0x300f00f
  bits = (bits | (bits << 4)) & 0x30c30c3
  return (bits | (bits << 2)) & 0x9249249
}
