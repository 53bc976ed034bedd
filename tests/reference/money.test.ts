import { expect, test } from 'vitest'
import { amountText } from '../../shared/lib/money/amount'
import { currencyCodes, minorUnits } from '../../shared/lib/money/currencies'
import { readReference } from './readReference'

const { rows, source, intlDiffers } = readReference<
  { code: string; digits: number },
  { intlDiffers: string[] }
>('iso-4217')

test(`digits of the minor unit of ${rows.length} currencies (${source})`, () => {
  expect(Object.fromEntries(rows.map(({ code }) => [code, minorUnits(code)]))).toEqual(
    Object.fromEntries(rows.map(({ code, digits }) => [code, digits])),
  )
  expect(currencyCodes).toEqual(rows.map(({ code }) => code).sort())
})

test(`the standard is followed where Intl differs from it (${source})`, () => {
  for (const code of intlDiffers) {
    const digits = rows.find((row) => row.code === code)!.digits
    expect(amountText({ minor: 12345, currency: code })).toBe((12345 / 10 ** digits).toFixed(digits))
  }
  expect(minorUnits('HUF')).toBe(2)
})

test('a code outside the list has no digits', () => {
  expect(minorUnits('ABC')).toBeUndefined()
  expect(minorUnits('eur')).toBeUndefined()
})
