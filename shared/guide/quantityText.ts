import { UNITS } from '../lib/units/units'
import type { Measure } from './schema'

/** A quantity as plain text, "0.2 mm", "12": the value and, after a no-break space, the symbol of its unit. */
export function quantityText({ value, unit }: Measure): string {
  const { symbol } = UNITS[unit]
  if (symbol === '') return value
  return unit === 'deg' || unit === '%' ? `${value}${symbol}` : `${value}\u00a0${symbol}`
}
