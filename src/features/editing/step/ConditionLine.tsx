import { useTranslation } from 'react-i18next'
import type { Condition } from '../../../../shared/guide/schema'
import { useDraft } from '../draftStore'
import { Balloon } from '../fields/Balloon'
import { useConditionSentence } from './useConditionSentence'

/** When a step is there, as a sentence with the balloons of the lines that it hangs on. */
export function ConditionLine({ when }: { when: Condition }) {
  const { t } = useTranslation('editing')
  const { numbers } = useDraft()
  const condition = useConditionSentence()
  return (
    <p className="condition" data-field="when">
      <span className="only" dir="auto">
        {condition(when)}
      </span>
      {when.map(({ line }) => (
        <span key={line} className="graphite">
          <Balloon line={line} /> {t('condition.line', { number: numbers.line[line] ?? '?' })}
        </span>
      ))}
    </p>
  )
}
