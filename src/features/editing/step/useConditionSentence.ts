import { useTranslation } from 'react-i18next'
import type { Condition } from '../../../../shared/guide/schema'
import { useDraft } from '../draftStore'

/** A condition as a sentence: "Only with: alternator", each line's options joined by "or", the lines by "and". */
export function useConditionSentence(): (when: Condition) => string {
  const { t, i18n } = useTranslation('editing')
  const { document } = useDraft()
  const or = new Intl.ListFormat(i18n.language, { type: 'disjunction' })
  const and = new Intl.ListFormat(i18n.language, { type: 'conjunction' })
  return (when) => {
    const clauses = when.map(({ line: lineId, is }) => {
      const line = document.lines.find((each) => each.id === lineId)
      const names = is.map((id) => line?.options.find((option) => option.id === id)?.part.name ?? '')
      return or.format(names.map((name) => (name === '' ? t('condition.unknown') : name)))
    })
    return t('condition.only', { what: and.format(clauses) })
  }
}
