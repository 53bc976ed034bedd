import { describe, expect, test } from 'vitest'
import { box, icosphere, prism, rightTetrahedron, tetrahedron, torus } from '../../fixtures/reference/solids'
import { edgesOf } from '../../shared/lib/geometry/edgesOf'
import { measureMesh } from '../../shared/lib/geometry/measureMesh'

/**
 * Source of the formulas: any handbook of mechanics; mass properties as in Mirtich (1996). Corners are given in doubles.
 * Tolerance where nothing else is said: some tens of roundings in doubles, 1e-14 relative for four facets, 1e-12 for thousands.
 */
const relative = (value: number, wanted: number): number => Math.abs(value / wanted - 1)

describe.each([1, 10, 250])('edge %d', (a) => {
  test('cube: a³, 6a², centre at a/2', () => {
    const cube = measureMesh(box(a, a, a))
    expect(relative(cube.volume, a ** 3)).toBeLessThan(1e-14)
    expect(relative(cube.area, 6 * a ** 2)).toBeLessThan(1e-14)
    for (const value of cube.centre) expect(relative(value, a / 2)).toBeLessThan(1e-14)
  })

  test('regular tetrahedron: a³/(6√2), √3 a²', () => {
    const solid = measureMesh(tetrahedron(a))
    expect(relative(solid.volume, a ** 3 / (6 * Math.SQRT2))).toBeLessThan(1e-14)
    expect(relative(solid.area, Math.sqrt(3) * a ** 2)).toBeLessThan(1e-14)
  })
})

test('box a × b × c: abc and 2(ab + bc + ca)', () => {
  const solid = measureMesh(box(2, 3, 7))
  expect(relative(solid.volume, 42)).toBeLessThan(1e-14)
  expect(relative(solid.area, 82)).toBeLessThan(1e-14)
  expect(solid.box).toEqual({ min: [0, 0, 0], max: [2, 3, 7] })
})

test('right tetrahedron with legs of 1 at the origin: 1/6, centre at a quarter', () => {
  const solid = measureMesh(rightTetrahedron())
  expect(relative(solid.volume, 1 / 6)).toBeLessThan(1e-14)
  for (const value of solid.centre) expect(relative(value, 0.25)).toBeLessThan(1e-14)
})

test.each([3, 6, 12, 96])('cylinder as a prism of %d sides: exactly the inscribed prism', (n) => {
  const [r, h] = [4, 11]
  const solid = measureMesh(prism(n, r, h))
  expect(relative(solid.volume, (n * r ** 2 * Math.sin((2 * Math.PI) / n) * h) / 2)).toBeLessThan(1e-12)
  const area = n * r ** 2 * Math.sin((2 * Math.PI) / n) + 2 * n * r * h * Math.sin(Math.PI / n)
  expect(relative(solid.area, area)).toBeLessThan(1e-12)
})

test('sphere: 4πr³/3 and 4πr² from within; the error falls fourfold with each subdivision', () => {
  const [r, wanted] = [1, (4 * Math.PI) / 3]
  const errors = [2, 3, 4, 5].map((n) => wanted - measureMesh(icosphere(r, n)).volume)
  for (const error of errors) expect(error).toBeGreaterThan(0)
  // The order of convergence is two; at 320 triangles the next term still shows in the second digit.
  for (let n = 1; n < errors.length; n++) expect(errors[n - 1]! / errors[n]!).toBeCloseTo(4, 0)
  expect(errors.at(-1)! / wanted).toBeLessThan(2e-3)
  expect(measureMesh(icosphere(r, 5)).triangles).toBe(20 * 4 ** 5)
})

test('torus: 2π²Rr² and 4π²Rr in the limit, and V − E + F = 0', () => {
  const [R, r] = [5, 2]
  const errors = [24, 48, 96].map(
    (n) => 2 * Math.PI ** 2 * R * r ** 2 - measureMesh(torus(R, r, 2 * n, n)).volume,
  )
  for (let n = 1; n < errors.length; n++) expect(errors[n - 1]! / errors[n]!).toBeCloseTo(4, 0)
  const fine = torus(R, r, 192, 96)
  expect(relative(measureMesh(fine).area, 4 * Math.PI ** 2 * R * r)).toBeLessThan(1e-3)
  expect(fine.positions.length / 3 - edgesOf(fine).count + fine.faces.length / 3).toBe(0)
})

test.each([
  ['box', box(1, 2, 3)],
  ['ball', icosphere(2, 3)],
  ['prism', prism(9, 1, 1)],
])('closed surface of genus 0 (%s): V − E + F = 2 and 3F = 2E', (_, mesh) => {
  const edges = edgesOf(mesh).count
  expect(mesh.positions.length / 3 - edges + mesh.faces.length / 3).toBe(2)
  expect(mesh.faces.length).toBe(2 * edges)
})
