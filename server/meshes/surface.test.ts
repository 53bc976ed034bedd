import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { box, bumpyBall, icosphere } from '../../fixtures/reference/solids'
import type { Mesh } from '../../shared/lib/geometry/mesh'
import { deviation } from './deviation'
import { Surface } from './surface'

const coordinate = fc.double({ min: -90, max: 90, noNaN: true })

/** The plain way: every facet, by itself a surface. */
function plainDistance({ positions, faces }: Mesh, point: [number, number, number]): number {
  let best = Infinity
  for (let corner = 0; corner < faces.length; corner += 3) {
    const alone = new Surface({ positions, faces: faces.slice(corner, corner + 3) })
    best = Math.min(best, alone.distanceSquared(...point))
  }
  return best
}

describe('distance from a surface', () => {
  test('of a box: the nearest corner, edge or face', () => {
    const surface = new Surface(box(2, 2, 2))
    expect(surface.distanceSquared(1, 1, 5)).toBeCloseTo(9)
    expect(surface.distanceSquared(-3, -4, 1)).toBeCloseTo(25)
    expect(surface.distanceSquared(3, 3, 3)).toBeCloseTo(3)
    expect(surface.distanceSquared(1, 1, 1)).toBeCloseTo(1)
    expect(surface.distanceSquared(2, 1, 1)).toBe(0)
  })

  test('agrees with asking every facet', () => {
    const ball = bumpyBall(300)
    const surface = new Surface(ball)
    fc.assert(
      fc.property(coordinate, coordinate, coordinate, (x, y, z) => {
        expect(surface.distanceSquared(x, y, z)).toBeCloseTo(plainDistance(ball, [x, y, z]), 8)
      }),
      { seed: 8, numRuns: 60 },
    )
  })

  test('stops early only at what is near enough', () => {
    const surface = new Surface(bumpyBall(3000))
    const exact = surface.distanceSquared(70, 0, 0)
    expect(surface.distanceSquared(70, 0, 0, exact * 4)).toBeLessThanOrEqual(exact * 4)
    expect(surface.distanceSquared(70, 0, 0, exact / 4)).toBe(exact)
  })

  test('facets without area do not spoil it', () => {
    const { positions, faces } = box(2, 2, 2)
    const surface = new Surface({ positions, faces: Uint32Array.from([...faces, 0, 0, 1, 3, 3, 3]) })
    expect(surface.distanceSquared(1, 1, 5)).toBeCloseTo(9)
  })
})

describe('deviation of two surfaces', () => {
  test('of a surface from itself is nothing', () => {
    // Middles of facets are rounded, so they lie off their own facet by a last digit.
    expect(deviation(box(1, 2, 3), box(1, 2, 3))).toBeLessThan(1e-15)
  })

  test('is found in both directions: a bump on either one counts', () => {
    const bump = box(1, 1, 1)
    const raised = {
      faces: bump.faces,
      positions: bump.positions.map((value, at) => (at === 23 ? 1.5 : value)),
    }
    expect(deviation(bump, raised)).toBeCloseTo(0.5, 6)
    expect(deviation(raised, bump)).toBeCloseTo(0.5, 6)
  })

  test('of an inscribed ball from a finer one is the height of its facets', () => {
    // Source: the sagitta of the largest facet of an icosphere of 1,280 triangles, r − √(r² − c²), c its circumradius.
    const coarse = icosphere(1, 3)
    let least = 1
    for (let corner = 0; corner < coarse.faces.length; corner += 3) {
      const sum = [0, 1, 2].map((axis) =>
        [0, 1, 2].reduce(
          (total, step) => total + coarse.positions[coarse.faces[corner + step]! * 3 + axis]!,
          0,
        ),
      )
      least = Math.min(least, Math.hypot(...sum) / 3)
    }
    expect(deviation(icosphere(1, 5), coarse)).toBeGreaterThan((1 - least) * 0.9)
    expect(deviation(icosphere(1, 5), coarse)).toBeLessThan((1 - least) * 1.2)
  })
})
