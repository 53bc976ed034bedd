import { useTranslation } from 'react-i18next'
import { quantityText } from '../../../../shared/guide/quantityText'
import type { Callout } from '../../../../shared/guide/schema'
import { useDraft } from '../draftStore'

/** What a callout is called: "balloon 12, Belt 10 × 950". */
export function useCalloutName(): (callout: Callout) => string {
  const { t } = useTranslation('editingFigures')
  const { document, numbers } = useDraft()
  return (callout) => {
    const kind = t(`callout.${callout.shape}`)
    switch (callout.shape) {
      case 'balloon': {
        const name = document.lines.find(({ id }) => id === callout.line)?.options[0]!.part.name ?? ''
        return t('callout.named', { kind: `${kind} ${numbers.line[callout.line] ?? '?'}`, name })
      }
      case 'dimension':
        return t('callout.named', { kind, name: quantityText(callout.value) })
      case 'arrow':
      case 'area':
        return callout.text === undefined || callout.text === ''
          ? kind
          : t('callout.named', { kind, name: callout.text })
    }
  }
}
