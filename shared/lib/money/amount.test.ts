import fc from 'fast-check'
import { expect, test } from 'vitest'
import { amountText, decimalMarkOf, parseAmount } from './amount'
import { currencyCodes } from './currencies'

test.each([
  ['12', 'EUR', 1200],
  ['12.5', 'EUR', 1250],
  ['$1,390.00', 'USD', 139000],
  ['1.234,50 €', 'EUR', 123450],
  ['1 234,50', 'EUR', 123450],
  ["CHF 1'234.50", 'CHF', 123450],
  ['￥1,234,567', 'JPY', 1234567],
  ['0.125', 'KWD', 125],
  ['4,50', 'SEK', 450],
  ['-0.05 USD', 'USD', -5],
  ['12.', 'EUR', 1200],
  ['2.500,00', 'EUR', 250000],
])('%s in %s is %d of the minor unit', (text, currency, minor) => {
  expect(parseAmount(text, currency)).toEqual({ minor, currency })
})

test.each([
  ['1,390', 'ambiguous'],
  ['1.390', 'ambiguous'],
  ['as needed', 'no number'],
  ['', 'no number'],
  ['12 to 14', 'no number'],
  ['1,2,3', 'no number'],
  ['12,34,567.00', 'no number'],
  ['0.001', 'too many digits'],
])('%s in euros: %s', (text, why) => {
  expect(parseAmount(text, 'EUR')).toBe(why)
})

test('a column decides what a cell leaves open', () => {
  expect(decimalMarkOf(['1,390', '12', '4.50'])).toBe('.')
  expect(parseAmount('￥1,390', 'JPY', '.')).toEqual({ minor: 1390, currency: 'JPY' })
  expect(parseAmount('1,390', 'EUR', ',')).toEqual({ minor: 139, currency: 'EUR' })
  expect(decimalMarkOf(['1,390', '12'])).toBeUndefined()
  expect(decimalMarkOf(['4,50', '4.50'])).toBeUndefined()
})

test('an amount that is written out is read as the same one, in every currency', () => {
  fc.assert(
    fc.property(fc.integer(), fc.constantFrom(...currencyCodes), (minor, currency) => {
      const money = { minor, currency }
      expect(parseAmount(amountText(money), currency, '.')).toEqual(money)
    }),
    { seed: 20261201, numRuns: 500 },
  )
})

test('a code that is no currency is a mistake of the program', () => {
  expect(() => amountText({ minor: 1, currency: 'ABC' })).toThrow(RangeError)
})
