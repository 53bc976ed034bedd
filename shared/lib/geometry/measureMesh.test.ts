import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import {
  asciiStl,
  box,
  bumpyBall,
  icosphere,
  prism,
  soupOf,
  tetrahedron,
  torus,
} from '../../../fixtures/reference/solids'
import { edgesOf } from './edgesOf'
import { measureMesh } from './measureMesh'
import type { Mesh } from './mesh'
import { readStl } from './readStl'
import { weld } from './weld'
import { writeStl } from './writeStl'

const SOLIDS = [box(2, 3, 4), tetrahedron(5), prism(7, 3, 8), torus(9, 2, 24, 12), icosphere(4, 2)]
const solid = fc.constantFrom(...SOLIDS)
const coordinate = fc.double({ min: -50, max: 50, noNaN: true })
const turn = fc.double({ min: -3, max: 3, noNaN: true })

function moved({ positions, faces }: Mesh, move: (x: number, y: number, z: number) => number[]): Mesh {
  const places = new Float64Array(positions.length)
  for (let at = 0; at < positions.length; at += 3)
    places.set(move(positions[at]!, positions[at + 1]!, positions[at + 2]!), at)
  return { positions: places, faces }
}

function flipped({ positions, faces }: Mesh): Mesh {
  return {
    positions,
    faces: faces.map((_, corner) => faces[corner - (corner % 3) + ((3 - (corner % 3)) % 3)]!),
  }
}

function joined(...meshes: Mesh[]): Mesh {
  const positions: number[] = []
  const faces: number[] = []
  for (const mesh of meshes) {
    const first = positions.length / 3
    positions.push(...mesh.positions)
    faces.push(...[...mesh.faces].map((vertex) => vertex + first))
  }
  return { positions: Float64Array.from(positions), faces: Uint32Array.from(faces) }
}

const without = ({ positions, faces }: Mesh, facet: number): Mesh => ({
  positions,
  faces: faces.filter((_, corner) => Math.floor(corner / 3) !== facet),
})

const close = (value: number, wanted: number, relative = 1e-12): void =>
  expect(Math.abs(value - wanted)).toBeLessThanOrEqual(relative * Math.max(1, Math.abs(wanted)))

describe('laws', () => {
  test('volume and area stay under turning and shifting; the centre goes along', () => {
    fc.assert(
      fc.property(solid, turn, turn, coordinate, coordinate, coordinate, (mesh, a, b, dx, dy, dz) => {
        const move = (x: number, y: number, z: number): number[] => {
          const [u, v] = [x * Math.cos(a) - y * Math.sin(a), x * Math.sin(a) + y * Math.cos(a)]
          return [u * Math.cos(b) - z * Math.sin(b) + dx, v + dy, u * Math.sin(b) + z * Math.cos(b) + dz]
        }
        const before = measureMesh(mesh)
        const after = measureMesh(moved(mesh, move))
        close(after.volume, before.volume)
        close(after.area, before.area)
        move(...before.centre).forEach((value, axis) => close(after.centre[axis]!, value))
        expect(after.closed).toBe(true)
      }),
      { seed: 5 },
    )
  })

  test('scaling by s gives s² the area and s³ the volume', () => {
    fc.assert(
      fc.property(solid, fc.double({ min: 0.01, max: 100, noNaN: true }), (mesh, s) => {
        const before = measureMesh(mesh)
        const after = measureMesh(moved(mesh, (x, y, z) => [x * s, y * s, z * s]))
        expect(after.volume / (before.volume * s ** 3)).toBeCloseTo(1, 12)
        expect(after.area / (before.area * s ** 2)).toBeCloseTo(1, 12)
      }),
      { seed: 6 },
    )
  })

  test('turning every facet negates the volume and changes nothing else', () => {
    for (const mesh of SOLIDS) {
      const before = measureMesh(mesh)
      const after = measureMesh(flipped(mesh))
      close(after.volume, -before.volume)
      expect({ ...after, volume: 0, area: 0, centre: 0 }).toEqual({
        ...before,
        volume: 0,
        area: 0,
        centre: 0,
      })
    }
  })

  test('far from the origin few digits are lost', () => {
    const there = measureMesh(moved(box(2, 3, 4), (x, y, z) => [x + 1e6, y - 1e6, z + 1e6]))
    close(there.volume, 24, 1e-9)
  })

  test('text and binary of one solid measure the same', () => {
    for (const mesh of SOLIDS) {
      const measure = (bytes: Uint8Array) => {
        const stl = readStl(bytes)
        if (!stl.ok) throw new Error(stl.why)
        return measureMesh(weld(stl.positions))
      }
      expect(measure(new TextEncoder().encode(asciiStl(mesh)))).toEqual(measure(writeStl(mesh)))
    }
  })

  test('the order of facets does not matter to the defects', () => {
    fc.assert(
      fc.property(fc.array(fc.nat(), { minLength: 12, maxLength: 12 }), (keys) => {
        const mesh = without(box(1, 2, 3), 4)
        const order = keys.slice(0, 11).map((key, facet) => [key, facet] as const)
        order.sort(([a], [b]) => a - b)
        const faces = Uint32Array.from(
          order.flatMap(([, facet]) => [...mesh.faces.slice(facet * 3, facet * 3 + 3)]),
        )
        expect(measureMesh({ ...mesh, faces })).toMatchObject({
          openEdges: 3,
          openFacets: 3,
          closed: false,
          shells: 1,
        })
      }),
      { seed: 7 },
    )
  })
})

describe('defects', () => {
  const sound = {
    openEdges: 0,
    backwardsEdges: 0,
    nonManifoldEdges: 0,
    degenerateFacets: 0,
    shells: 1,
    closed: true,
  }

  test('a sound solid has none', () => {
    for (const mesh of SOLIDS) expect(measureMesh(mesh)).toMatchObject(sound)
  })

  test('a facet that is missing leaves three open edges', () => {
    expect(measureMesh(without(torus(9, 2, 24, 12), 100))).toMatchObject({
      openEdges: 3,
      openFacets: 3,
      closed: false,
    })
  })

  test('a facet that is turned makes its three edges run backwards', () => {
    const mesh = box(1, 2, 3)
    const faces = mesh.faces.slice()
    ;[faces[1], faces[2]] = [faces[2]!, faces[1]!]
    expect(measureMesh({ ...mesh, faces })).toMatchObject({ backwardsEdges: 3, openEdges: 0, closed: false })
  })

  test('two boxes that share an edge: closed, with one edge of four facets', () => {
    const other = moved(box(1, 1, 1), (x, y, z) => [x + 1, y + 1, z])
    const mesh = weld(soupOf(joined(box(1, 1, 1), other)))
    expect(measureMesh(mesh)).toMatchObject({ ...sound, nonManifoldEdges: 1, volume: 2 })
  })

  test('a hollow box has two shells and the difference as its volume', () => {
    const hole = flipped(moved(box(1, 1, 1), (x, y, z) => [x + 1, y + 1, z + 1]))
    expect(measureMesh(joined(box(3, 3, 3), hole))).toMatchObject({ ...sound, shells: 2, volume: 26 })
  })

  test('facets that cover nothing are counted and harm nothing else', () => {
    const mesh = box(1, 1, 1)
    const faces = Uint32Array.from([...mesh.faces, 0, 0, 1, 3, 3, 3])
    expect(measureMesh({ ...mesh, faces })).toMatchObject({ ...sound, degenerateFacets: 2, volume: 1 })
  })

  test('a mesh without facets measures nothing and is not closed', () => {
    const nothing = measureMesh({ positions: new Float32Array(), faces: new Uint32Array() })
    expect(nothing).toMatchObject({ triangles: 0, area: 0, volume: 0, closed: false, shells: 0 })
  })

  test('an index without a vertex is the programmer’s error', () => {
    const { positions } = tetrahedron(1)
    expect(() => measureMesh({ positions, faces: Uint32Array.from([0, 1, 4]) })).toThrow(RangeError)
  })
})

test('edges agree with a plain map, also about a vertex of many facets', () => {
  for (const mesh of [prism(200, 3, 4), without(bumpyBall(2_000), 5), joined(box(1, 1, 1), tetrahedron(2))]) {
    const plain = new Map<string, number>()
    mesh.faces.forEach((vertex, corner) => {
      const next = mesh.faces[corner % 3 === 2 ? corner - 2 : corner + 1]!
      const key = `${Math.min(vertex, next)} ${Math.max(vertex, next)}`
      plain.set(key, (plain.get(key) ?? 0) + 1)
    })
    const { count, starts } = edgesOf(mesh)
    const sizes = Array.from({ length: count }, (_, edge) => starts[edge + 1]! - starts[edge]!)
    expect(sizes.sort()).toEqual([...plain.values()].sort())
  }
})
