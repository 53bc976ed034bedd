import { useTranslation } from 'react-i18next'
import { UNITS, type UnitCode } from '../../../../shared/lib/units/units'

/** How a unit is called where it is chosen: its symbol, or a word for what is counted and for the bare number. */
export function useUnitWord(): (code: UnitCode) => string {
  const { t } = useTranslation('editing')
  return (code) =>
    code === 'each'
      ? t('unit.each')
      : code === 'one'
        ? t('unit.one')
        : UNITS[code].dimension === 'count'
          ? t(`unit.${code}`)
          : UNITS[code].symbol
}
