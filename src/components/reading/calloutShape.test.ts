import { expect, test } from 'vitest'
import { slopeOf, wordsPlace } from './calloutShape'

const origin = { x: 0, y: 0 }

test('a slope is that of the line as it is seen', () => {
  // In a square picture equal parts of both sides are 45 degrees; in one of 2 : 1 the height counts half.
  expect(slopeOf(origin, { x: 1000, y: 1000 }, 1)).toBe(45)
  expect(slopeOf(origin, { x: 1000, y: 1000 }, 2)).toBe(26.6)
  expect(slopeOf(origin, { x: -1000, y: 0 }, 2)).toBe(180)
})

test('the figure of a dimension stands in the gap of its line', () => {
  const value = { value: '4', unit: 'mm' } as const
  const at = { x: 1000, y: 2000 }
  const tip = { x: 2001, y: 4000 }
  expect(wordsPlace({ id: 'callout00001', shape: 'dimension', at, tip, value })).toEqual({ x: 1501, y: 3000 })
  expect(wordsPlace({ id: 'callout00001', shape: 'arrow', at, tip })).toEqual(at)
})
