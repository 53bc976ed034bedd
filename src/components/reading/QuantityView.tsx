import { UNITS } from '../../../shared/lib/units/units'
import type { Measure } from '../../../shared/guide/schema'
import { useWords } from './useWords'

/** A value with its unit set small after a thin space. Counted things have their word: "2 pairs". */
export function QuantityView({ value, unit, plusMinus }: Measure & { plusMinus?: string }) {
  const { t, number } = useWords()
  const { symbol, dimension } = UNITS[unit]
  const named = dimension === 'count' && unit !== 'each'
  return (
    <span className="num nowrap" dir="ltr">
      {number(value)}
      {plusMinus !== undefined && ` ± ${number(plusMinus)}`}
      {named ? (
        <span className="unit">{t(`guide:unit.${unit}`, { count: Number(value) })}</span>
      ) : (
        symbol !== '' && <span className="unit">{symbol}</span>
      )}
    </span>
  )
}
