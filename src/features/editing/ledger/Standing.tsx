import { useTranslation } from 'react-i18next'
import type { Reconciled } from '../../../../shared/guide/reconcile'
import { useUnitWord } from '../fields/useUnitWord'

const TONE: Record<Reconciled['balance'], string> = {
  even: 'lichen',
  'as needed': 'graphite',
  'more listed': 'ochre',
  unused: 'ochre',
  'more used': 'oxide',
  'units differ': 'oxide',
  'no quantity': 'oxide',
}

/** What the steps use against what the list asks for, in words and colour. */
export function Standing({ of }: { of: Reconciled }) {
  const { t } = useTranslation('editing')
  const word = useUnitWord()
  const unit = of.listed?.unit ?? of.used?.unit ?? 'each'
  const symbol = unit === 'each' ? '' : ` ${word(unit)}`
  return (
    <span className={TONE[of.balance]}>
      {t(`balance.${of.balance}`, {
        used: of.used?.value ?? '',
        listed: of.listed?.value ?? '',
        unit: symbol,
      })}
    </span>
  )
}
