import Big from 'big.js'
import { UNITS, type UnitCode } from '../lib/units/units'
import { unitFor } from '../lib/units/unitFor'
import { Decimal, type Measure, type Quantity } from './schema'

/**
 * Why something typed is no quantity. `ambiguous`: one thousand here, one there ("1,000"). `two numbers`: "2 x 500 mm" may mean two
 * pieces or one metre, and only a person knows.
 */
export type QuantityTrouble =
  | 'empty'
  | 'no number'
  | 'unknown unit'
  | 'ambiguous'
  | 'two numbers'
  | 'below nought'
  | 'too large'
  | 'too long'

/** `quantity` null says "as needed". */
export type ParsedQuantity = { ok: true; quantity: Quantity | null } | { ok: false; why: QuantityTrouble }
export type ParsedMeasure = { ok: true; measure: Measure } | { ok: false; why: QuantityTrouble }

/** The longest `typed` that a document keeps. */
const LONGEST = 60

const AS_NEEDED =
  /^(as (needed|required|necessary)|a\/?r|if needed|nach bedarf|n\. ?b\.|según (necesidad|sea necesario)|(selon|au) besoin|conforme necess[aá]rio|secondo necessità|حسب الحاجة|适量|適量)\.?$/i

const ABOUT =
  /^(~|≈|∼|about|approx(imately)?\.?|around|circa|ca?\.|ungef[aä]hr|etwa|env(iron)?\.?|aprox\.?|حوالي|约|約)\s*/i

const VULGAR: Record<string, string> = {
  '½': '1/2',
  '⅓': '1/3',
  '⅔': '2/3',
  '¼': '1/4',
  '¾': '3/4',
  '⅕': '1/5',
  '⅖': '2/5',
  '⅗': '3/5',
  '⅘': '4/5',
  '⅙': '1/6',
  '⅚': '5/6',
  '⅛': '1/8',
  '⅜': '3/8',
  '⅝': '5/8',
  '⅞': '7/8',
}

/** The noughts of the scripts in which people write numbers: Arabic, Persian, Devanagari, full width. */
const NOUGHTS = [0x660, 0x6f0, 0x966, 0xff10]

const latinDigit = (digit: string): string => {
  const code = digit.codePointAt(0)!
  const nought = NOUGHTS.find((first) => code >= first && code <= first + 9)
  return nought === undefined ? digit : String(code - nought)
}

/** One way to write one: digits of any script as 0–9, Arabic separators, no-break spaces, vulgar fractions, the minus sign. */
const inPlainForm = (typed: string): string =>
  typed
    .normalize('NFC')
    .replace(/\p{Nd}/gu, latinDigit)
    .replace(
      /(\d?)([½⅓⅔¼¾⅕⅖⅗⅘⅙⅚⅛⅜⅝⅞])/gu,
      (_, whole: string, one: string) => `${whole}${whole === '' ? '' : ' '}${VULGAR[one]!}`,
    )
    .replace(/٫/g, '.')
    .replace(/⁄/g, '/')
    .replace(/−/g, '-')
    .replace(/[\s\u00a0\u2007\u2009\u202f]+/gu, ' ')
    .trim()

const NUMBER = String.raw`-?(?:\d+ \d+ ?\/ ?\d+|\d+ ?\/ ?\d+|\d[\d.,']*|[.,]\d+)`
const COUNT_BEFORE = new RegExp(`^[x×] ?(${NUMBER})$`, 'i')
const RANGE = new RegExp(`^(${NUMBER}) ?(?:[-–—…]|\\.\\.\\.?|to|bis|a|à|إلى) ?(${NUMBER}) ?(\\D*)$`, 'i')
const SINGLE = new RegExp(`^(${NUMBER}) ?(.*)$`)

/**
 * What a person wrote in a quantity's place: "12", "1/2 in", "1½", "~8", "2x", "x2", "2 pcs", "3 m", "8-10" (the larger, so that there is enough), "as
 * needed". Decimal comma or point; digits of several scripts. The form is kept in `typed` where value and unit do not say it again.
 * @param unit what a bare number counts.
 * @returns never a guess: what may mean two things is refused with a reason, and the caller keeps the text.
 */
export function parseQuantity(typed: string, unit: UnitCode = 'each'): ParsedQuantity {
  if (AS_NEEDED.test(inPlainForm(typed))) return { ok: true, quantity: null }
  const parsed = parseMeasure(typed, unit)
  if (!parsed.ok) return parsed
  return parsed.measure.value.startsWith('-')
    ? { ok: false, why: 'below nought' }
    : { ok: true, quantity: parsed.measure }
}

/** The same for a value that may be below nought ("-4 °C"), of which there is always a number. */
export function parseMeasure(typed: string, unit: UnitCode = 'each'): ParsedMeasure {
  const plain = inPlainForm(typed)
  if (plain === '') return { ok: false, why: 'empty' }
  if (plain.length > LONGEST) return { ok: false, why: 'too long' }
  const words = plain.replace(ABOUT, '')
  const found = partsOf(words)
  if (found === undefined) return { ok: false, why: 'no number' }
  const values: Big[] = []
  for (const number of found.numbers) {
    const value = valueOf(number)
    if (typeof value === 'string') return { ok: false, why: value }
    values.push(value)
  }
  if (/\d/.test(found.unit)) {
    // "mm2" ends in a digit and is a unit; "x 500 mm" holds a second number.
    if (unitFor(found.unit) === undefined) return { ok: false, why: 'two numbers' }
  }
  const code = found.unit === '' ? unit : unitFor(found.unit)
  if (code === undefined) return { ok: false, why: 'unknown unit' }
  const value = values
    .reduce((a, b) => (a.gt(b) ? a : b))
    .round(9)
    .toFixed()
  if (!Decimal.safeParse(value).success) return { ok: false, why: 'too large' }
  const kept = saysNoMore(plain, value, code) ? {} : { typed: typed.trim().slice(0, LONGEST) }
  return { ok: true, measure: { value: withTypedDigits(plain, value), unit: code, ...kept } }
}

function partsOf(words: string): { numbers: string[]; unit: string } | undefined {
  const before = COUNT_BEFORE.exec(words)
  if (before !== null) return { numbers: [before[1]!], unit: 'x' }
  const range = RANGE.exec(words)
  if (range !== null) return { numbers: [range[1]!, range[2]!], unit: range[3]!.trim() }
  const single = SINGLE.exec(words)
  return single === null ? undefined : { numbers: [single[1]!], unit: single[2]!.trim() }
}

function valueOf(number: string): Big | QuantityTrouble {
  const fraction = /^(-?)(?:(\d+) )?(\d+) ?\/ ?(\d+)$/.exec(number)
  if (fraction !== null) {
    const [, sign, whole = '0', above, below] = fraction
    if (Big(below!).eq(0)) return 'no number'
    const value = Big(above!).div(below!).plus(whole)
    return sign === '-' ? value.times(-1) : value
  }
  // One thousand here, one there: asking is better than guessing.
  if (/^-?[1-9]\d{0,2}([,.']\d{3})+$/.test(number) && !/^-?\d+\.\d{3}$/.test(number)) return 'ambiguous'
  const decimal = number
    .replace(',', '.')
    .replace(/^(-?)\./, '$10.')
    .replace(/\.$/, '')
  return /^-?\d+(\.\d+)?$/.test(decimal) ? Big(decimal) : 'ambiguous'
}

/** "0.30" keeps its last nought, which says how exact it is. */
function withTypedDigits(plain: string, value: string): string {
  const digits = /^-?\d{1,12}\.\d{1,9}/.exec(plain.replace(',', '.'))?.[0]
  return digits !== undefined && Big(digits).eq(value) ? digits.replace(/^(-?)0+(?=\d)/, '$1') : value
}

/** Value and unit, written out, are what was typed. */
function saysNoMore(plain: string, value: string, unit: UnitCode): boolean {
  const [, number = '', rest = ''] = /^(-?\d+(?:[.,]\d+)?) ?(.*)$/.exec(plain) ?? []
  if (number === '' || !Big(number.replace(',', '.')).eq(value)) return false
  return rest === '' || rest === unit || rest.replace(/ /g, '') === UNITS[unit].symbol.replace(/ /g, '')
}
