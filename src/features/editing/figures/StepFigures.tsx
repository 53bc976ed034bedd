import { useTranslation } from 'react-i18next'
import type { Id } from '../../../../shared/lib/ids/id'
import { stepsOf } from '../../../../shared/guide/stepsOf'
import { useDraft } from '../draftStore'
import { useReorder } from '../fields/useReorder'
import { BringPictures } from './BringPictures'
import { moveFigure } from './changeFigures'
import { FigureCard } from './FigureCard'
import { useBringing } from './useBringing'
import '../../../styles/callouts.css'
import './figures.css'

/** The figures of a step, or the front figure where there is no step. Pictures can be dropped anywhere on the page, and pasted. */
export function StepFigures({ stepId }: { stepId: Id | null }) {
  const { t } = useTranslation('editingFigures')
  const { document, edit, readOnly, announce, numbers } = useDraft()
  const step = stepsOf(document).find(({ id }) => id === stepId)
  const ids = stepId === null ? (document.front === null ? [] : [document.front]) : (step?.figures ?? [])
  const figures = ids.flatMap((id) => document.figures.filter((figure) => figure.id === id))
  const { bring, busy, over } = useBringing(stepId)
  const move = (id: Id, to: number): void => {
    if (stepId === null) return
    if (to < 0 || to >= ids.length) return announce(t('order.end'))
    edit((doc) => moveFigure(doc, stepId, id, to))
    announce(t('order.moved', { number: to + 1, count: ids.length }))
  }
  const reorder = useReorder(ids, move)
  if (stepId !== null && step === undefined) return null
  return (
    <section className="step-figures" aria-label={t('name')} data-over={over || undefined}>
      {figures.map((figure, index) => (
        <FigureCard
          key={figure.id}
          figure={figure}
          stepId={stepId}
          when={step?.when}
          number={numbers.figure[figure.id] ?? '?'}
          index={index}
          count={figures.length}
          onMove={(by) => move(figure.id, index + by)}
          reorder={reorder}
        />
      ))}
      {!readOnly && (
        <BringPictures
          onBring={(files) => void bring(files)}
          busy={busy}
          over={over}
          none={figures.length === 0}
          front={stepId === null}
        />
      )}
    </section>
  )
}
