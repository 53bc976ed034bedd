import { expect, test } from 'vitest'
import { readDecimal } from './readDecimal'

test.each([
  ['12', '12'],
  [' 0.30 ', '0.30'],
  ['0,5', '0.5'],
  ['.5', '0.5'],
  ['5.', '5'],
  ['١٢٫٥', '12.5'],
  ['۱۲', '12'],
  ['', null],
] as const)('reads "%s" as %s', (typed, value) => {
  expect(readDecimal(typed)).toEqual({ ok: true, value })
})

test.each(['1e3', 'twelve', '1.2.3', '-4', '1,000', '1,000,000', '1 2', '5½'])(
  'does not guess at "%s"',
  (typed) => {
    expect(readDecimal(typed)).toEqual({ ok: false })
  },
)

test('may be below nought where that is meant, and whole where it must be', () => {
  expect(readDecimal('-0,4', { below0: true })).toEqual({ ok: true, value: '-0.4' })
  expect(readDecimal('−4', { below0: true })).toEqual({ ok: true, value: '-4' })
  expect(readDecimal('2.5', { whole: true })).toEqual({ ok: false })
})
