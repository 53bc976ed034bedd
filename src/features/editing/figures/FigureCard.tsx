import type { KeyboardEvent } from 'react'
import { useTranslation } from 'react-i18next'
import { ArrowDown, ArrowUp, GripVertical, X } from 'lucide-react'
import { setNode } from '../../../../shared/guide/edit'
import type { Condition, Figure } from '../../../../shared/guide/schema'
import type { Id } from '../../../../shared/lib/ids/id'
import { useDraft } from '../draftStore'
import { GuideText } from '../fields/GuideText'
import type { Reorder } from '../fields/useReorder'
import { useOpenDraft } from '../frame/sessionContext'
import { nudgeBy } from '../outline/nudgeBy'
import { removeFigure } from './changeFigures'
import { FigurePlate } from './FigurePlate'

export interface FigureCardProps {
  figure: Figure
  stepId: Id | null
  when: Condition | undefined
  number: string
  index: number
  count: number
  onMove: (by: -1 | 1) => void
  reorder: Reorder
}

/** One figure: its picture with callouts, caption and alternative text. */
export function FigureCard(props: FigureCardProps) {
  const { figure, stepId, when, number, index, count, onMove, reorder } = props
  const { t } = useTranslation('editingFigures')
  const { edit, readOnly } = useDraft()
  const { sayDone } = useOpenDraft()
  const set = (patch: Partial<Figure>, field: string): void =>
    edit((doc) => setNode(doc, 'figure', figure.id, patch), `figure.${field}.${figure.id}`)
  const remove = (): void => {
    edit((doc) => removeFigure(doc, stepId, figure.id))
    sayDone(t('removed', { number }))
  }
  const onKeyDown = (event: KeyboardEvent): void => {
    const by = nudgeBy(event)
    if (by === 0 || readOnly) return
    event.preventDefault()
    onMove(by)
  }
  return (
    <figure
      className="figure-card"
      data-node={figure.id}
      aria-label={t('figure', { number })}
      onKeyDown={onKeyDown}
      {...reorder.row(figure.id)}
    >
      <div className="figure-head">
        {!readOnly && count > 1 && (
          <span className="figure-grip" title={t('order.drag')} {...reorder.grip(figure.id)}>
            <GripVertical size={16} />
          </span>
        )}
        <b>{t('figure', { number })}</b>
        {!readOnly && (
          <span className="figure-acts">
            {count > 1 && (
              <>
                <button
                  type="button"
                  className="remove"
                  disabled={index === 0}
                  onClick={() => onMove(-1)}
                  aria-label={t('order.up', { number })}
                >
                  <ArrowUp size={16} aria-hidden />
                </button>
                <button
                  type="button"
                  className="remove"
                  disabled={index === count - 1}
                  onClick={() => onMove(1)}
                  aria-label={t('order.down', { number })}
                >
                  <ArrowDown size={16} aria-hidden />
                </button>
              </>
            )}
            <button type="button" className="remove" onClick={remove} aria-label={t('remove', { number })}>
              <X size={16} aria-hidden />
            </button>
          </span>
        )}
      </div>
      <FigurePlate figure={figure} when={when} />
      <GuideText
        lines
        look="plain"
        label={t('caption.label')}
        field="caption"
        placeholder={t('caption.hint')}
        value={figure.caption}
        onChange={(caption) => set({ caption }, 'caption')}
      />
      <GuideText
        lines
        look="plain"
        label={t('alt.label')}
        description={t('alt.why')}
        field="alt"
        placeholder={t('alt.hint')}
        value={figure.alt}
        onChange={(alt) => set({ alt }, 'alt')}
      />
    </figure>
  )
}
