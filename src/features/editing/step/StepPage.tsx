import { useTranslation } from 'react-i18next'
import { setNode } from '../../../../shared/guide/edit'
import type { Step } from '../../../../shared/guide/schema'
import type { Id } from '../../../../shared/lib/ids/id'
import { GuideText } from '../fields/GuideText'
import { DecimalInput } from '../fields/DecimalInput'
import { StepFigures } from '../figures/StepFigures'
import { useDraft } from '../draftStore'
import { NoSuchStep } from '../frame/DraftFrame'
import { useOpenDraft } from '../frame/sessionContext'
import { usePageTitle } from '../frame/usePageTitle'
import { stepsOf } from '../../../../shared/guide/stepsOf'
import { StepText } from '../text/StepText'
import { Cautions } from './Cautions'
import { Checks } from './Checks'
import { ConditionLine } from './ConditionLine'
import { PutIn } from './PutIn'
import { StepModels } from './StepModels'
import { StepTools } from './StepTools'
import { Uses } from './Uses'

/** One step, written in the order in which it is read: cautions before the action, then the text, figures, checks and parts. */
export function StepPage({ stepId }: { stepId: Id }) {
  const { document } = useDraft()
  const { guideId } = useOpenDraft()
  const step = stepsOf(document).find((each) => each.id === stepId)
  if (step === undefined) return <NoSuchStep guideId={guideId} />
  return <StepFields step={step} key={stepId} />
}

function StepFields({ step }: { step: Step }) {
  const { t } = useTranslation('editing')
  const { document, edit, numbers } = useDraft()
  const number = numbers.step[step.id] ?? 0
  const title = step.title === '' ? t('outline.untitledStep') : step.title
  usePageTitle(`${t('outline.stepName', { number, title })} · ${document.title}`)
  const set = (patch: Partial<Step>, field: string): void =>
    edit((doc) => setNode(doc, 'step', step.id, patch), `step.${field}.${step.id}`)
  return (
    <article className="step-fields" data-node={step.id}>
      <PutIn step={step} />
      <h1 className="visually-hidden">{t('outline.stepName', { number, title })}</h1>
      <div className="step-head">
        <span className="step-number" aria-hidden>
          {number}
        </span>
        <GuideText
          look="plain"
          className="t4 title-field"
          label={t('step.title')}
          hideLabel
          field="title"
          placeholder={t('step.titleHint')}
          value={step.title}
          onChange={(value) => set({ title: value }, 'title')}
        />
      </div>
      {step.when !== undefined && step.when.length > 0 && <ConditionLine when={step.when} />}
      <Cautions owner={step.id} cautions={step.cautions} />
      <div data-field="body">
        <StepText stepId={step.id} />
      </div>
      <div data-field="figures">
        <StepFigures stepId={step.id} />
      </div>
      <Checks step={step} />
      <Uses step={step} />
      <StepTools step={step} />
      <StepModels step={step} />
      <section className="step-part">
        <h2 className="t2">{t('step.work')}</h2>
        <div className="time-people">
          <div data-field="minutes">
            <DecimalInput
              whole
              label={t('step.minutes')}
              unit="min"
              value={step.minutes === null ? null : String(step.minutes)}
              onChange={(value) => set({ minutes: value === null ? null : Number(value) }, 'minutes')}
              maxLength={5}
            />
          </div>
          <div data-field="people">
            <DecimalInput
              whole
              label={t('step.people')}
              value={String(step.people)}
              onChange={(value) => {
                const people = Number(value ?? '1')
                if (people >= 1) set({ people }, 'people')
              }}
              maxLength={2}
            />
          </div>
        </div>
      </section>
    </article>
  )
}
