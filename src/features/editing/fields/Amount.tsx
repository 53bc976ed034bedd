import { UNITS } from '../../../../shared/lib/units/units'
import type { Measure, Quantity } from '../../../../shared/guide/schema'

/** A value with its unit set small. Pieces have none. */
export function Amount({ of }: { of: Quantity | Measure }) {
  const { symbol } = UNITS[of.unit]
  return (
    <span className="nowrap num">
      {of.value}
      {symbol !== '' && <span className="unit">{symbol}</span>}
    </span>
  )
}
