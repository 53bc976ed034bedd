import type { Mesh } from '../../../shared/lib/geometry/mesh'

/** A rotation (three rows) and a shift: x' = m0 x + m1 y + m2 z + m3, and so on. Twelve numbers. */
export type Placement = readonly number[]

/** A solid standing at its place. Without a placement it stands as it was made. */
export interface PlacedMesh {
  name: string
  mesh: Mesh
  at?: Placement
}

/** From where, and on what sheet. */
export interface View {
  /** Degrees from +x towards +y in which the onlooker stands. */
  azimuth: number
  /** Degrees above the ground plane (z is up) from which they look. */
  elevation: number
  /** The sheet in pixels; the drawing is made as large as fits. Its real height follows the drawing. */
  width: number
  mostHeight: number
  /** Free border on each side, where balloons stand. */
  margin: number
}

/** The view for models of which nothing is known but that z is up: three faces of a box seen, none foreshortened to a sliver. */
export const FROM_THE_FRONT: View = { azimuth: -57, elevation: 26, width: 620, mostHeight: 520, margin: 14 }

/** Vertices on the sheet: x to the right, y down, and depth away from the onlooker, all in pixels. */
export interface Projected {
  readonly points: Float64Array
  readonly faces: Uint32Array
}

export interface Projection {
  width: number
  height: number
  parts: Projected[]
  /** Where a point of space comes to lie. */
  place: (point: readonly [number, number, number]) => [number, number, number]
}

/** Parallel projection of all parts, scaled so that they fill the sheet within its margin. */
export function project(parts: readonly PlacedMesh[], view: View): Projection {
  const turned = parts.map((part) => turn(part, view))
  const min = [Infinity, Infinity]
  const max = [-Infinity, -Infinity]
  for (const points of turned) {
    for (let index = 0; index < points.length; index += 3) {
      for (let axis = 0; axis < 2; axis++) {
        min[axis] = Math.min(min[axis]!, points[index + axis]!)
        max[axis] = Math.max(max[axis]!, points[index + axis]!)
      }
    }
  }
  if (min[0] === Infinity) return { width: view.width, height: view.width, parts: [], place: () => [0, 0, 0] }
  const spanX = Math.max(max[0]! - min[0]!, 1e-9)
  const spanY = Math.max(max[1]! - min[1]!, 1e-9)
  const scale = Math.min((view.width - 2 * view.margin) / spanX, (view.mostHeight - 2 * view.margin) / spanY)
  const width = Math.ceil(spanX * scale + 2 * view.margin)
  const height = Math.ceil(spanY * scale + 2 * view.margin)
  const onSheet = (x: number, y: number, depth: number): [number, number, number] => [
    (x - min[0]!) * scale + view.margin,
    (y - min[1]!) * scale + view.margin,
    depth * scale,
  ]
  for (const points of turned) {
    for (let index = 0; index < points.length; index += 3) {
      points.set(onSheet(points[index]!, points[index + 1]!, points[index + 2]!), index)
    }
  }
  const axes = axesOf(view)
  return {
    width,
    height,
    parts: parts.map((part, index) => ({ points: turned[index]!, faces: part.mesh.faces })),
    place: ([x, y, z]) => {
      const along = (axis: number): number =>
        x * axes[axis * 3]! + y * axes[axis * 3 + 1]! + z * axes[axis * 3 + 2]!
      return onSheet(along(0), along(1), along(2))
    },
  }
}

/** Right, down and away, as rows. */
function axesOf({ azimuth, elevation }: View): number[] {
  const a = (azimuth * Math.PI) / 180
  const e = (elevation * Math.PI) / 180
  const [ca, sa, ce, se] = [Math.cos(a), Math.sin(a), Math.cos(e), Math.sin(e)]
  return [-sa, ca, 0, se * ca, se * sa, -ce, -ce * ca, -ce * sa, -se]
}

function turn({ mesh, at }: PlacedMesh, view: View): Float64Array {
  const m = at ?? [1, 0, 0, 0, 0, 1, 0, 0, 0, 0, 1, 0]
  const v = axesOf(view)
  const { positions } = mesh
  const points = new Float64Array(positions.length)
  for (let index = 0; index < positions.length; index += 3) {
    const px = positions[index]!
    const py = positions[index + 1]!
    const pz = positions[index + 2]!
    const x = m[0]! * px + m[1]! * py + m[2]! * pz + m[3]!
    const y = m[4]! * px + m[5]! * py + m[6]! * pz + m[7]!
    const z = m[8]! * px + m[9]! * py + m[10]! * pz + m[11]!
    points[index] = v[0]! * x + v[1]! * y + v[2]! * z
    points[index + 1] = v[3]! * x + v[4]! * y + v[5]! * z
    points[index + 2] = v[6]! * x + v[7]! * y + v[8]! * z
  }
  return points
}
