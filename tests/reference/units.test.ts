import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { convert, UNITS, unitCodes, type Unit, type UnitCode } from '../../shared/lib/units/units'
import { readReference } from './readReference'

const { rows, source } = readReference<{ unit: string; si: string; factor?: number; exact: 0 | 1 }>('units')
const nist = (unit: string) => rows.find((row) => row.unit === unit)!

/** Our code, the row of the reference, and our unit that is the SI unit of that row. */
const PAIRS: [UnitCode, string, UnitCode][] = [
  ['in', 'in', 'm'],
  ['ft', 'ft', 'm'],
  ['yd', 'yd', 'm'],
  ['lb', 'lb', 'kg'],
  ['oz', 'oz (avoirdupois)', 'kg'],
  ['gal-us', 'gal (US)', 'm3'],
  ['lbf', 'lbf', 'N'],
  ['lbf.ft', 'lbf·ft', 'N.m'],
  ['psi', 'psi', 'Pa'],
  ['bar', 'bar', 'Pa'],
  ['kWh', 'kWh', 'J'],
]

describe(source, () => {
  // Tolerance: the reference holds factors as doubles, which keep 16 digits; ours are decimals.
  test.each(PAIRS)('1 %s', (code, row, si) => {
    expect(Math.abs(Number(convert('1', code, si)) / nist(row).factor! - 1)).toBeLessThan(1e-15)
  })

  test('ampere hours and revolutions per minute, of which the SI units are not offered', () => {
    // 1 A h = 3600 C; the base unit of charge is the coulomb.
    expect(Number(UNITS.Ah.factor)).toBe(nist('A·h').factor)
    // A rotation is 2π rad, so 1 rpm in rad/s is 2π times its hertz.
    expect(
      Math.abs((Number(convert('1', 'rpm', 'Hz')) * 2 * Math.PI) / nist('rpm').factor! - 1),
    ).toBeLessThan(1e-15)
  })

  // K = (°F + 459.67)/1.8, K = °C + 273.15: exact.
  test.each([
    ['32', 'degF', 'degC', '0'],
    ['0', 'degC', 'degF', '32'],
    ['212', 'degF', 'degC', '100'],
    ['-40', 'degC', 'degF', '-40'],
    ['-459.67', 'degF', 'K', '0'],
    ['0', 'degC', 'K', '273.15'],
    ['98.6', 'degF', 'degC', '37'],
  ] as const)('%s %s in %s is %s', (value, from, to, expected) => {
    expect(convert(value, from, to)).toBe(expected)
  })

  test('exact factors stay exact: no digit is rounded', () => {
    expect(convert('1', 'ft', 'mm')).toBe('304.8')
    expect(convert('16.5', 'in', 'mm')).toBe('419.1')
    expect(convert('0.1', 'm', 'mm')).toBe('100')
    expect(convert('1', 'oz', 'g')).toBe('28.349523125')
    expect(convert('3600', 's', 'h')).toBe('1')
    expect(convert('1', 'kWh', 'J')).toBe('3600000')
  })
})

const amount = fc.tuple(fc.integer({ min: -1e9, max: 1e9 }), fc.nat(9)).map(([digits, places]) => {
  const text = String(Math.abs(digits)).padStart(places + 1, '0')
  const whole = places === 0 ? text : `${text.slice(0, -places)}.${text.slice(-places)}`
  return digits < 0 ? `-${whole}` : whole
})

test('a conversion and back returns the value', () => {
  fc.assert(
    fc.property(amount, fc.constantFrom(...unitCodes), fc.constantFrom(...unitCodes), (value, from, to) => {
      const there = convert(value, from, to)
      const dimension = (code: UnitCode): string => UNITS[code].dimension
      const converts = from === to || (dimension(from) === dimension(to) && dimension(from) !== 'count')
      expect(there !== undefined).toBe(converts)
      // Tolerance: thirty digits are kept where a division does not end, and the way back may multiply their rounding by 1e9.
      if (there !== undefined)
        expect(Math.abs(Number(convert(there, to, from)) - Number(value))).toBeLessThan(1e-12)
    }),
    { seed: 20261201, numRuns: 2000 },
  )
})

test('nothing counted converts, so that packs are not taken for pieces', () => {
  expect(convert('1', 'pack', 'each')).toBeUndefined()
  expect(convert('1', 'pair', 'each')).toBeUndefined()
  expect(convert('1', 'm', 'kg')).toBeUndefined()
})

const rec20 = readReference<{ code: string; name: string }>('unece-rec20')

test(`every unit has its code (${rec20.source}; ${rec20.status})`, () => {
  const known = new Set(rec20.rows.map(({ code }) => code))
  const own: [string, Unit][] = Object.entries(UNITS)
  expect(own.filter(([, unit]) => !known.has(unit.rec20)).map(([code]) => code)).toEqual([])
  // One code for one unit; a bare number is counted in "one" as pieces are.
  const codes = own.filter(([code]) => code !== 'one').map(([, unit]) => unit.rec20)
  expect(new Set(codes).size).toBe(codes.length)
  const nameOf = (code: UnitCode): string | undefined =>
    rec20.rows.find((row) => row.code === UNITS[code].rec20)?.name
  expect([nameOf('lbf.ft'), nameOf('rpm'), nameOf('l/s'), nameOf('degF'), nameOf('kohm')]).toEqual([
    'pound-force foot',
    'revolutions per minute',
    'litre per second',
    'degree Fahrenheit',
    'kiloohm',
  ])
})
