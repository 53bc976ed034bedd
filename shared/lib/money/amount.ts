import Big from 'big.js'
import { minorUnits } from './currencies'

/** An amount of money: a whole count of the currency's minor unit (cents, fils; yen themselves), never a float. */
export interface Money {
  minor: number
  currency: string
}

/** "12.50" for 1250 EUR, "12" for 12 JPY, "-0.005" for −5 KWD. @throws RangeError for a code that ISO 4217 does not have: a programmer's error. */
export function amountText({ minor, currency }: Money): string {
  const digits = digitsOf(currency)
  return Big(minor).div(Big(10).pow(digits)).toFixed(digits)
}

function digitsOf(currency: string): number {
  const digits = minorUnits(currency)
  if (digits === undefined) throw new RangeError(`${currency} is no currency of ISO 4217`)
  return digits
}

type Mark = '.' | ','

/** Why a text is no amount. `ambiguous`: "1,390" may be one and a bit or over a thousand; another cell of the column may decide. */
export type AmountTrouble = 'no number' | 'ambiguous' | 'too many digits'

/**
 * A price as people write it ("$1,390.00", "1.234,50 €", "￥1,390", "12"), in a known currency. Signs, codes and blanks round the number are passed
 * over; `mark` is the decimal mark of the column, where it is known (see `decimalMarkOf`).
 */
export function parseAmount(text: string, currency: string, mark?: Mark): Money | AmountTrouble {
  const number = /-?\d[\d.,'\s\u00a0\u202f]*/.exec(text)?.[0].trim().replace(/[.,]$/, '')
  if (number === undefined || /\d/.test(text.slice(text.indexOf(number) + number.length))) return 'no number'
  const bare = number.replace(/['\s\u00a0\u202f]/g, '')
  const decimal = mark ?? ownMark(bare)
  if (decimal === 'ambiguous') return 'ambiguous'
  const [whole = '', part = '', ...rest] = decimal === undefined ? [bare] : bare.split(decimal)
  if (rest.length > 0 || /[.,]/.test(part) || !isGrouped(whole)) return 'no number'
  const digits = digitsOf(currency)
  if (part.replace(/0+$/, '').length > digits) return 'too many digits'
  const value = Big(`${whole.replace(/[.,]/g, '')}.${part || '0'}`)
  return { minor: value.times(Big(10).pow(digits)).toNumber(), currency }
}

/** Marks that group digits stand before three of them each: "1,234,567". */
const isGrouped = (whole: string): boolean => /^-?(\d+|\d{1,3}([.,]\d{3})+)$/.test(whole)

/** The decimal mark that a number shows by itself; undefined where it has none. */
function ownMark(number: string): Mark | 'ambiguous' | undefined {
  const marks = number.replace(/[^.,]/g, '')
  const last = marks.at(-1) as Mark | undefined
  if (last === undefined) return undefined
  if (new Set(marks).size === 2) return last
  const grouped = isGrouped(number)
  // One mark alone with other than three digits behind it is the decimal mark; the same mark twice groups.
  if (marks.length > 1) return grouped ? otherMark(last) : last
  return grouped && !/^-?0[.,]/.test(number) ? 'ambiguous' : last
}

const otherMark = (mark: Mark): Mark => (mark === '.' ? ',' : '.')

/** The decimal mark of a column of prices: what those that show it by themselves agree on; undefined where none does, or they differ. */
export function decimalMarkOf(column: readonly string[]): Mark | undefined {
  const shown = column
    .map((text) => ownMark(/-?\d[\d.,]*/.exec(text)?.[0].replace(/[.,]$/, '') ?? ''))
    .filter((mark) => mark === '.' || mark === ',')
  return new Set(shown).size === 1 ? shown[0] : undefined
}
