import { expect, test } from 'vitest'
import { asAddress } from './LinkForm'
import { measureIn } from './quantityRule'

test.each([
  ['4 mm', { value: '4', unit: 'mm' }],
  ['4mm', { value: '4', unit: 'mm' }],
  ['−4 °C', { value: '-4', unit: 'degC' }],
  ['10%', { value: '10', unit: '%' }],
  ['4in', { value: '4', unit: 'in' }],
  ['1/2"', { value: '0.5', unit: 'in', typed: '1/2"' }],
  ['20 N·m', { value: '20', unit: 'N.m', typed: '20 N·m' }],
] as const)('"%s" is a number with its unit', (typed, measure) => {
  expect(measureIn(typed)).toEqual(measure)
})

// "4 in the morning", "2 sets", "5 bolts", "1,000 m", a bare number and a word stay words.
test.each(['4 in', '2 sets', '5 bolts', '1,000 m', '12', 'mm'])('"%s" stays words', (typed) => {
  expect(measureIn(typed)).toBeUndefined()
})

test.each([
  ['example.org/a', 'https://example.org/a'],
  ['https://example.org', 'https://example.org'],
  ['a@example.org', 'mailto:a@example.org'],
  ['#step-3', '#step-3'],
  ['javascript:alert(1)', undefined],
  ['two words', undefined],
  ['', undefined],
])('as an address "%s" is %s', (typed, address) => {
  expect(asAddress(typed)).toBe(address)
})
