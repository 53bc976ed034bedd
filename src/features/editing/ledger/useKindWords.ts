import { useMemo } from 'react'
import { useTranslation } from 'react-i18next'
import { LineKind } from '../../../../shared/guide/schema'
import type { KindWords } from './columns'

/** The kinds of line in the person's words. */
export function useKindWords(): KindWords {
  const { t } = useTranslation('guide')
  return useMemo(
    () => Object.fromEntries(LineKind.options.map((kind) => [kind, t(`lineKind.${kind}`)])) as KindWords,
    [t],
  )
}
