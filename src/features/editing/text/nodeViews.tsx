import { NodeViewWrapper, type ReactNodeViewProps } from '@tiptap/react'
import { useContext } from 'react'
import { useTranslation } from 'react-i18next'
import { Measure } from '../../../../shared/guide/schema'
import { stepsOf } from '../../../../shared/guide/stepsOf'
import { useDraft } from '../draftStore'
import { PartBalloon } from '../fields/PartBalloon'
import { Amount } from '../fields/Amount'
import { TextActsContext } from './textActs'

/** A line's balloon within a sentence. */
export function BalloonInText({ node }: ReactNodeViewProps) {
  const acts = useContext(TextActsContext)
  return (
    <NodeViewWrapper as="span">
      <PartBalloon line={String(node.attrs.line)} when={acts?.when} />
    </NodeViewWrapper>
  )
}

/** A number with its unit within a sentence; pressed, it opens to be changed. */
export function QuantityInText({ node, getPos }: ReactNodeViewProps) {
  const { t } = useTranslation('editingText')
  const { readOnly } = useDraft()
  const acts = useContext(TextActsContext)
  const measure = Measure.safeParse({ value: node.attrs.value, unit: node.attrs.unit })
  return (
    <NodeViewWrapper as="span">
      <span
        className="quantity-in-text"
        title={readOnly ? undefined : t('number.change')}
        onClick={(event) => {
          const pos = getPos()
          if (!readOnly && pos !== undefined) acts?.changeQuantity(pos, event.currentTarget)
        }}
      >
        {measure.success ? <Amount of={measure.data} /> : '?'}
      </span>
    </NodeViewWrapper>
  )
}

export function FigureInText({ node }: ReactNodeViewProps) {
  const { t } = useTranslation('editingText')
  const { document, numbers } = useDraft()
  const id = String(node.attrs.figure)
  const figure = document.figures.find((each) => each.id === id)
  return (
    <NodeViewWrapper as="span">
      <span className="reference-in-text" title={figure?.caption}>
        {figure === undefined
          ? t('reference.gone')
          : t('reference.figure', { number: numbers.figure[id] ?? '?' })}
      </span>
    </NodeViewWrapper>
  )
}

export function StepInText({ node }: ReactNodeViewProps) {
  const { t } = useTranslation('editingText')
  const { document, numbers } = useDraft()
  const id = String(node.attrs.step)
  const step = stepsOf(document).find((each) => each.id === id)
  return (
    <NodeViewWrapper as="span">
      <span className="reference-in-text" title={step?.title}>
        {step === undefined ? t('reference.gone') : t('reference.step', { number: numbers.step[id] ?? '?' })}
      </span>
    </NodeViewWrapper>
  )
}
