import fc from 'fast-check'
import { expect, test } from 'vitest'
import { unitCodes, UNITS } from '../lib/units/units'
import { unitFor } from '../lib/units/unitFor'
import { parseMeasure, parseQuantity } from './parseQuantity'
import { quantityText } from './quantityText'
import { Quantity } from './schema'

// The forms are those that people were seen to write in parts lists, and the vulgar fractions of inch sizes (common practice).
test.each([
  ['12', { value: '12', unit: 'each' }],
  [' 0.30 ', { value: '0.30', unit: 'each' }],
  ['2,5 mm', { value: '2.5', unit: 'mm' }],
  ['4mm', { value: '4', unit: 'mm' }],
  ['1/2 in', { value: '0.5', unit: 'in', typed: '1/2 in' }],
  ['1 1/2"', { value: '1.5', unit: 'in', typed: '1 1/2"' }],
  ['1½ inch', { value: '1.5', unit: 'in', typed: '1½ inch' }],
  ['⅜″', { value: '0.375', unit: 'in', typed: '⅜″' }],
  ['1/3', { value: '0.333333333', unit: 'each', typed: '1/3' }],
  ['~8', { value: '8', unit: 'each', typed: '~8' }],
  ['approx. 8', { value: '8', unit: 'each', typed: 'approx. 8' }],
  ['ca. 3 m', { value: '3', unit: 'm', typed: 'ca. 3 m' }],
  ['2x', { value: '2', unit: 'each', typed: '2x' }],
  ['x2', { value: '2', unit: 'each', typed: 'x2' }],
  ['× 2', { value: '2', unit: 'each', typed: '× 2' }],
  ['3 pcs', { value: '3', unit: 'each', typed: '3 pcs' }],
  ['2 sets', { value: '2', unit: 'set', typed: '2 sets' }],
  ['4 Stück', { value: '4', unit: 'each', typed: '4 Stück' }],
  ['8-10', { value: '10', unit: 'each', typed: '8-10' }],
  ['8 to 10 mm', { value: '10', unit: 'mm', typed: '8 to 10 mm' }],
  ['20 N·m', { value: '20', unit: 'N.m', typed: '20 N·m' }],
  ['5 m²', { value: '5', unit: 'm2' }],
  ['5 m2', { value: '5', unit: 'm2' }],
  ['٤ قطع', { value: '4', unit: 'each', typed: '٤ قطع' }],
  ['٢٫٥', { value: '2.5', unit: 'each' }],
])('reads "%s"', (typed, quantity) => {
  expect(parseQuantity(typed)).toEqual({ ok: true, quantity })
})

test.each(['as needed', 'As required', 'A/R', 'nach Bedarf', 'حسب الحاجة'])('"%s" is as needed', (typed) => {
  expect(parseQuantity(typed)).toEqual({ ok: true, quantity: null })
})

test.each([
  ['', 'empty'],
  ['-', 'no number'],
  ['x', 'no number'],
  ['some', 'no number'],
  ['1,000', 'ambiguous'],
  ['1.000.000', 'ambiguous'],
  ['1.2.3', 'ambiguous'],
  ['8/4*', 'unknown unit'],
  ['12 furlongs', 'unknown unit'],
  ['2 x 500 mm', 'two numbers'],
  ['-3', 'below nought'],
  ['1/0', 'no number'],
  ['1234567890123', 'too large'],
  ['9'.repeat(61), 'too long'],
])('refuses "%s": %s', (typed, why) => {
  expect(parseQuantity(typed)).toEqual({ ok: false, why })
})

test('a bare number counts in the unit that is asked for', () => {
  expect(parseQuantity('3', 'm')).toEqual({ ok: true, quantity: { value: '3', unit: 'm' } })
})

test('a measure may be below nought', () => {
  expect(parseMeasure('−4 °C')).toEqual({ ok: true, measure: { value: '-4', unit: 'degC' } })
})

test('every symbol is read as its own unit', () => {
  for (const code of unitCodes) if (UNITS[code].symbol !== '') expect(unitFor(UNITS[code].symbol)).toBe(code)
})

test('what a quantity is written as is read as that quantity', () => {
  const value = fc
    .tuple(fc.nat(99999), fc.stringMatching(/^(\.\d{1,9})?$/))
    .map(([whole, rest]) => `${whole}${rest}`)
  fc.assert(
    fc.property(value, fc.constantFrom(...unitCodes), (number, unit) => {
      const quantity = { value: number, unit }
      expect(parseQuantity(quantityText(quantity), unit)).toEqual({ ok: true, quantity })
    }),
    { seed: 4107, numRuns: 500 },
  )
})

test('whatever is typed, what comes back fits the document', () => {
  const bits = fc.constantFrom(
    '1',
    '0',
    '12',
    '.',
    ',',
    '/',
    ' ',
    'x',
    '-',
    '~',
    'mm',
    '"',
    '½',
    'to',
    '٣',
    "'",
    '9999999',
    '\u0000',
    '€',
  )
  fc.assert(
    fc.property(
      fc.oneof(
        fc.string(),
        fc.array(bits, { maxLength: 12 }).map((each) => each.join('')),
      ),
      (typed) => {
        const parsed = parseQuantity(typed)
        if (parsed.ok && parsed.quantity !== null) Quantity.parse(parsed.quantity)
      },
    ),
    { seed: 4107, numRuns: 3000 },
  )
})
