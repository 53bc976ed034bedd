import fc from 'fast-check'
import { expect, test } from 'vitest'
import { box, bumpyBall, soupOf } from '../../../fixtures/reference/solids'
import { weld } from './weld'

/** The plain way: a map of the coordinates as text. */
function plainWeld(soup: Float32Array): number[] {
  const known = new Map<string, number>()
  return Array.from({ length: soup.length / 3 }, (_, corner) => {
    const key = [0, 1, 2].map((axis) => soup[corner * 3 + axis]! + 0).join(' ')
    const vertex = known.get(key) ?? known.size
    known.set(key, vertex)
    return vertex
  })
}

test('a box has eight vertices', () => {
  const { positions, faces } = weld(soupOf(box(1, 2, 3)))
  expect(positions.length).toBe(24)
  expect(faces.length).toBe(36)
})

test('-0 and 0 are one place', () => {
  const soup = Float32Array.from([0, 0, 0, 1, 0, 0, 0, 1, 0, -0, 0, -0, 0, 1, -0, -1, 0, 0])
  expect([...weld(soup).faces]).toEqual([0, 1, 2, 0, 2, 3])
})

test('neighbouring numbers are two places: nothing is moved', () => {
  const next = 1 + 2 ** -23
  expect([...weld(Float32Array.from([1, 0, 0, next, 0, 0, 0, 1, 0])).faces]).toEqual([0, 1, 2])
})

test('agrees with the plain way on few places, many times used', () => {
  fc.assert(
    fc.property(fc.array(fc.constantFrom(-1, -0, 0, 1, 0.5), { maxLength: 300 }), (numbers) => {
      const soup = Float32Array.from(numbers.slice(0, numbers.length - (numbers.length % 9)))
      expect([...weld(soup).faces]).toEqual(plainWeld(soup))
    }),
    { seed: 4 },
  )
})

test('agrees with the plain way while its table grows, on a mesh and on a regular grid', () => {
  const grid = Float32Array.from({ length: 30_000 * 3 }, (_, at) => (at % 3 === 0 ? at % 211 : at % 89))
  for (const soup of [soupOf(bumpyBall(20_000)), grid]) expect([...weld(soup).faces]).toEqual(plainWeld(soup))
})

test('every corner keeps its place', () => {
  const soup = soupOf(bumpyBall(3_000))
  const { positions, faces } = weld(soup)
  const back = soupOf({ positions, faces })
  expect([...back]).toEqual([...soup])
})
