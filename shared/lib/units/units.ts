import Big from 'big.js'
import { z } from 'zod'

type Dimension =
  | 'count'
  | 'length'
  | 'area'
  | 'volume'
  | 'mass'
  | 'time'
  | 'angle'
  | 'force'
  | 'torque'
  | 'pressure'
  | 'power'
  | 'energy'
  | 'voltage'
  | 'current'
  | 'resistance'
  | 'charge'
  | 'frequency'
  | 'flow'
  | 'mass flow'
  | 'speed'
  | 'temperature'
  | 'ratio'

/**
 * A unit. `factor` is the exact number of the dimension's base unit, as a decimal or as a fraction "a/b"; a temperature also has an
 * `offset` added after the factor. `rec20` is the UN/CEFACT Recommendation 20 code. Sources of factors: NIST SP 811 (2008), B.8.
 */
export interface Unit {
  symbol: string
  rec20: string
  dimension: Dimension
  factor: string
  offset?: string
}

const unit = (symbol: string, rec20: string, dimension: Dimension, factor: string, offset?: string): Unit =>
  offset === undefined ? { symbol, rec20, dimension, factor } : { symbol, rec20, dimension, factor, offset }

/** Every unit that a document may use. Things that are counted do not convert into each other: a set is not a pair. */
export const UNITS = {
  each: unit('', 'C62', 'count', '1'),
  pair: unit('pair', 'PR', 'count', '1'),
  set: unit('set', 'SET', 'count', '1'),
  pack: unit('pack', 'PK', 'count', '1'),
  roll: unit('roll', 'RO', 'count', '1'),
  sheet: unit('sheet', 'ST', 'count', '1'),
  mm: unit('mm', 'MMT', 'length', '0.001'),
  cm: unit('cm', 'CMT', 'length', '0.01'),
  m: unit('m', 'MTR', 'length', '1'),
  km: unit('km', 'KMT', 'length', '1000'),
  um: unit('µm', '4H', 'length', '0.000001'),
  in: unit('in', 'INH', 'length', '0.0254'),
  ft: unit('ft', 'FOT', 'length', '0.3048'),
  yd: unit('yd', 'YRD', 'length', '0.9144'),
  mm2: unit('mm²', 'MMK', 'area', '0.000001'),
  cm2: unit('cm²', 'CMK', 'area', '0.0001'),
  m2: unit('m²', 'MTK', 'area', '1'),
  ft2: unit('ft²', 'FTK', 'area', '0.09290304'),
  ml: unit('ml', 'MLT', 'volume', '0.000001'),
  l: unit('l', 'LTR', 'volume', '0.001'),
  m3: unit('m³', 'MTQ', 'volume', '1'),
  'gal-us': unit('US gal', 'GLL', 'volume', '0.003785411784'),
  g: unit('g', 'GRM', 'mass', '0.001'),
  kg: unit('kg', 'KGM', 'mass', '1'),
  t: unit('t', 'TNE', 'mass', '1000'),
  lb: unit('lb', 'LBR', 'mass', '0.45359237'),
  oz: unit('oz', 'ONZ', 'mass', '0.028349523125'),
  s: unit('s', 'SEC', 'time', '1'),
  min: unit('min', 'MIN', 'time', '60'),
  h: unit('h', 'HUR', 'time', '3600'),
  d: unit('d', 'DAY', 'time', '86400'),
  deg: unit('°', 'DD', 'angle', '1'),
  N: unit('N', 'NEW', 'force', '1'),
  kN: unit('kN', 'B47', 'force', '1000'),
  lbf: unit('lbf', 'C78', 'force', '4.4482216152605'),
  'N.m': unit('N m', 'NU', 'torque', '1'),
  'lbf.ft': unit('lbf ft', 'M92', 'torque', '1.3558179483314004'),
  Pa: unit('Pa', 'PAL', 'pressure', '1'),
  kPa: unit('kPa', 'KPA', 'pressure', '1000'),
  MPa: unit('MPa', 'MPA', 'pressure', '1000000'),
  bar: unit('bar', 'BAR', 'pressure', '100000'),
  psi: unit('psi', 'PS', 'pressure', '44482216152605/6451600000'),
  W: unit('W', 'WTT', 'power', '1'),
  kW: unit('kW', 'KWT', 'power', '1000'),
  J: unit('J', 'JOU', 'energy', '1'),
  kJ: unit('kJ', 'KJO', 'energy', '1000'),
  Wh: unit('Wh', 'WHR', 'energy', '3600'),
  kWh: unit('kWh', 'KWH', 'energy', '3600000'),
  mV: unit('mV', '2Z', 'voltage', '0.001'),
  V: unit('V', 'VLT', 'voltage', '1'),
  mA: unit('mA', '4K', 'current', '0.001'),
  A: unit('A', 'AMP', 'current', '1'),
  ohm: unit('Ω', 'OHM', 'resistance', '1'),
  kohm: unit('kΩ', 'B49', 'resistance', '1000'),
  Ah: unit('Ah', 'AMH', 'charge', '3600'),
  Hz: unit('Hz', 'HTZ', 'frequency', '1'),
  rpm: unit('rpm', 'RPM', 'frequency', '1/60'),
  'l/s': unit('l/s', 'G51', 'flow', '0.001'),
  'l/min': unit('l/min', 'L2', 'flow', '1/60000'),
  'm3/h': unit('m³/h', 'MQH', 'flow', '1/3600'),
  'kg/d': unit('kg/d', 'F30', 'mass flow', '1/86400'),
  'm/s': unit('m/s', 'MTS', 'speed', '1'),
  'mm/s': unit('mm/s', 'C16', 'speed', '0.001'),
  K: unit('K', 'KEL', 'temperature', '1'),
  degC: unit('°C', 'CEL', 'temperature', '1', '273.15'),
  degF: unit('°F', 'FAH', 'temperature', '5/9', '45967/180'),
  '%': unit('%', 'P1', 'ratio', '0.01'),
  one: unit('', 'C62', 'ratio', '1'),
} as const satisfies Record<string, Unit>

export type UnitCode = keyof typeof UNITS
export const unitCodes = Object.keys(UNITS) as [UnitCode, ...UnitCode[]]
export const UnitCode = z.enum(unitCodes)

/** Digits kept behind the point where a division does not end. */
const DIVISION_DIGITS = 30

const exact = Big()
exact.DP = DIVISION_DIGITS

function fraction(text: string): { above: Big; below: Big } {
  const [above, below = '1'] = text.split('/')
  return { above: exact(above!), below: exact(below) }
}

/**
 * A value in another unit of the same dimension, as a decimal string: exact where it ends, else to 30 digits behind the point. All is
 * multiplied out first and divided once, so that 0 °C is 32 °F and no digit near it.
 * @returns undefined where the two cannot be converted (a length into a mass, a pair into a set).
 */
export function convert(value: string, from: UnitCode, to: UnitCode): string | undefined {
  if (from === to) return value
  const a: Unit = UNITS[from]
  const b: Unit = UNITS[to]
  if (a.dimension !== b.dimension || a.dimension === 'count') return undefined
  const [factorA, factorB] = [fraction(a.factor), fraction(b.factor)]
  const [offsetA, offsetB] = [fraction(a.offset ?? '0'), fraction(b.offset ?? '0')]
  // (value · fA + oA − oB) / fB, each a fraction
  const above = exact(value)
    .times(factorA.above)
    .times(offsetA.below)
    .times(offsetB.below)
    .plus(offsetA.above.times(factorA.below).times(offsetB.below))
    .minus(offsetB.above.times(factorA.below).times(offsetA.below))
    .times(factorB.below)
  const below = factorA.below.times(offsetA.below).times(offsetB.below).times(factorB.above)
  return above.div(below).toFixed()
}
