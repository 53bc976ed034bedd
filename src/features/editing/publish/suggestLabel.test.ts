import { expect, test } from 'vitest'
import { suggestLabel } from './suggestLabel'

test.each([
  [null, 'A'],
  ['A', 'B'],
  ['Z', 'AA'],
  ['AZ', 'BA'],
  ['3', '4'],
  ['1.9', '1.10'],
  ['C2', 'C3'],
  ['spring', ''],
] as const)('after %s comes "%s"', (last, next) => {
  expect(suggestLabel(last)).toBe(next)
})
