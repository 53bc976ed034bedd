import type { KeyboardEvent } from 'react'
import { useTranslation } from 'react-i18next'
import { NavLink, useNavigate } from 'react-router-dom'
import { Ellipsis } from 'lucide-react'
import type { Finding } from '../../../../shared/guide/finding'
import type { Step } from '../../../../shared/guide/schema'
import { Menu } from '../../../components/controls/Menu'
import { useDraft } from '../draftStore'
import { stepAddress } from '../frame/addresses'
import { useOpenDraft } from '../frame/sessionContext'
import { useConditionSentence } from '../step/useConditionSentence'
import { FindingMark } from './FindingMark'
import { placeOf } from './moveInOutline'
import { nudgeBy } from './nudgeBy'
import { useRowDrag } from './OutlineDrag'
import { stepsOf } from '../../../../shared/guide/stepsOf'
import type { OutlineActs } from './useOutlineActs'

interface Props {
  step: Step
  acts: OutlineActs
  current: boolean
  findings: readonly Finding[]
}

/** A step in the outline. Alt with the arrow keys moves it. */
export function StepRow({ step, acts, current, findings }: Props) {
  const { t } = useTranslation('editing')
  const { guideId } = useOpenDraft()
  const { numbers, document, readOnly } = useDraft()
  const navigate = useNavigate()
  const condition = useConditionSentence()
  const number = numbers.step[step.id] ?? 0
  const title = step.title === '' ? t('outline.untitledStep') : step.title
  const { setNode, grip, landing } = useRowDrag({ kind: 'step', id: step.id, title: `${number} ${title}` })
  const onKeyDown = (event: KeyboardEvent): void => {
    const by = nudgeBy(event)
    if (by === 0 || readOnly) return
    event.preventDefault()
    acts.nudge('step', step.id, by)
  }
  const at = placeOf(document, step.id) ?? { section: 0, step: 0 }
  const all = stepsOf(document)
  const others = document.sections.filter((_, index) => index !== at.section)
  return (
    <li
      className={current ? 'outline-row now' : 'outline-row'}
      ref={setNode}
      data-landing={landing}
      data-node={`outline-${step.id}`}
      onKeyDown={onKeyDown}
    >
      {!readOnly && grip}
      <NavLink to={stepAddress(guideId, step.id)} aria-current={current ? 'page' : undefined}>
        <b>{number}</b>
        <span dir="auto" className={step.title === '' ? 'graphite' : undefined}>
          {title}
          {step.when !== undefined && step.when.length > 0 && <small>{condition(step.when)}</small>}
        </span>
      </NavLink>
      <FindingMark findings={findings} />
      {!readOnly && (
        <Menu
          kind="quiet"
          label={t('outline.actsOf', { name: t('outline.stepName', { number, title }) })}
          actions={[
            {
              id: 'rename',
              label: t('outline.rename'),
              onAction: () => void navigate(`${stepAddress(guideId, step.id)}?field=title`),
            },
            {
              id: 'add',
              label: t('outline.addStepAfter'),
              onAction: () => acts.addAfter(document.sections[at.section]!.id, at.step + 1),
            },
            { id: 'copy', label: t('outline.copy'), onAction: () => acts.copy(step) },
            {
              id: 'up',
              label: t('outline.up'),
              disabled: at.section === 0 && at.step === 0,
              onAction: () => acts.nudge('step', step.id, -1),
            },
            {
              id: 'down',
              label: t('outline.down'),
              disabled: at.section === document.sections.length - 1 && all.at(-1)?.id === step.id,
              onAction: () => acts.nudge('step', step.id, 1),
            },
            ...others.map((section) => ({
              id: `to-${section.id}`,
              label: t('outline.moveTo', { letter: numbers.section[section.id], title: section.title }),
              onAction: () => acts.moveTo(step.id, section.id),
            })),
            { id: 'remove', label: t('outline.remove'), onAction: () => acts.removeStep(step) },
          ]}
        >
          <Ellipsis size={16} aria-hidden />
        </Menu>
      )}
    </li>
  )
}
