import { useTranslation } from 'react-i18next'
import { insertNode } from '../../../../shared/guide/edit'
import type { Step } from '../../../../shared/guide/schema'
import { useDraft } from '../draftStore'
import { focusPlace } from '../frame/useGoToPlace'
import { emptyCaution } from './Cautions'
import { emptyCheck } from './Checks'

/** What can be put into a step, always in reach: goes to the place where it is chosen, or adds it and goes there. */
export function PutIn({ step }: { step: Step }) {
  const { t } = useTranslation('editing')
  const { edit, newId, readOnly } = useDraft()
  if (readOnly) return null
  const goTo = (field: string): void => focusPlace(null, field)
  const acts = [
    { name: 'part', act: () => goTo('add-use') },
    { name: 'tool', act: () => goTo('add-tool') },
    { name: 'figure', act: () => goTo('figures') },
    {
      name: 'caution',
      act: () => {
        const caution = emptyCaution(newId())
        edit((doc) => insertNode(doc, 'caution', caution, step.id))
        setTimeout(() => focusPlace(caution.id, 'hazard'))
      },
    },
    {
      name: 'check',
      act: () => {
        const check = emptyCheck(newId())
        edit((doc) => insertNode(doc, 'check', check, step.id))
        setTimeout(() => focusPlace(check.id, 'text'))
      },
    },
    { name: 'model', act: () => goTo('add-model') },
  ]
  return (
    <div className="put-in" role="group" aria-label={t('putIn.name')}>
      <span aria-hidden>{t('putIn.name')}</span>
      {acts.map(({ name, act }) => (
        <button key={name} type="button" onClick={act}>
          {t(`putIn.${name}`)}
        </button>
      ))}
    </div>
  )
}
