import type { KeyboardEvent, ReactNode, RefObject } from 'react'
import { useTranslation } from 'react-i18next'
import type { Callout, Condition, Place } from '../../../../shared/guide/schema'
import { placeStyle, wordsPlace } from '../../../components/reading/calloutShape'
import { useDraft } from '../draftStore'
import { Amount } from '../fields/Amount'
import { PartBalloon } from '../fields/PartBalloon'
import { nudged } from './places'
import { useCalloutName } from './useCalloutName'
import { useHandleDrag } from './useHandleDrag'

interface Ends {
  at: Place
  tip: Place | null
}

export interface CalloutHandlesProps {
  callout: Callout
  when: Condition | undefined
  plate: RefObject<HTMLElement | null>
  onMoving: (ends: Ends | null) => void
  onMove: (ends: Ends) => void
  onOpen: (anchor: Element) => void
  onRemove: () => void
}

/** A callout that has been placed, to take hold of: its words, and the end of its line. */
export function CalloutHandles(props: CalloutHandlesProps) {
  const { callout, when } = props
  const { t } = useTranslation('editingFigures')
  const { document } = useDraft()
  const nameOf = useCalloutName()
  const { at, tip, shape } = callout
  if (at === null) return null
  const name = nameOf(callout)
  const words =
    shape === 'balloon' ? (
      <PartBalloon line={callout.line} when={when} />
    ) : shape === 'dimension' ? (
      <span className="dt">
        <Amount of={callout.value} />
      </span>
    ) : null
  // A dimension is moved as a whole by its figure, the others by their words alone: their tip stays on the part.
  const moved = (to: Place): Ends => {
    const from = wordsPlace({ ...callout, at })
    if (shape !== 'dimension' && shape !== 'area') return { at: to, tip }
    const by = { x: to.x - from.x, y: to.y - from.y }
    const shifted = (place: Place): Place => ({ x: clamp(place.x + by.x), y: clamp(place.y + by.y) })
    return { at: shifted(at), tip: tip && shifted(tip) }
  }
  return (
    <>
      <Handle
        {...props}
        id={callout.id}
        place={wordsPlace({ ...callout, at })}
        label={t('callout.handle', { name, ...percents(at) })}
        className={shape === 'balloon' ? 'callout-words of-balloon' : 'callout-words'}
        endsFor={moved}
      >
        {words}
        {callout.text !== undefined && callout.text !== '' ? (
          <span className="dt" dir="auto" lang={document.lang}>
            {callout.text}
          </span>
        ) : (
          words === null && <span className="dt no-words">{t(`callout.${shape}`)}</span>
        )}
      </Handle>
      {shape === 'dimension' && tip !== null && (
        <Handle
          {...props}
          place={at}
          label={t('callout.start', { name, ...percents(at) })}
          className="callout-end"
          endsFor={(to) => ({ at: to, tip })}
        />
      )}
      {tip !== null && (
        <Handle
          {...props}
          place={tip}
          label={t('callout.end', { name, ...percents(tip) })}
          className="callout-end"
          endsFor={(to) => ({ at, tip: to })}
        />
      )}
    </>
  )
}

interface HandleProps extends Pick<
  CalloutHandlesProps,
  'plate' | 'onMoving' | 'onMove' | 'onOpen' | 'onRemove'
> {
  id?: string
  place: Place
  label: string
  className: string
  /** Both ends of the callout when this handle stands at a place. */
  endsFor: (to: Place) => Ends
  children?: ReactNode
}

function Handle({
  id,
  place,
  label,
  className,
  endsFor,
  plate,
  onMoving,
  onMove,
  onOpen,
  onRemove,
  children,
}: HandleProps) {
  const { readOnly } = useDraft()
  const drag = useHandleDrag(plate, {
    onMoving: (to) => onMoving(to && endsFor(to)),
    onDrop: (to) => onMove(endsFor(to)),
    onPress: onOpen,
  })
  if (readOnly) {
    return children === undefined ? null : (
      <span className={className} style={placeStyle(place)}>
        {children}
      </span>
    )
  }
  const onKeyDown = (event: KeyboardEvent): void => {
    const to =
      event.altKey || event.ctrlKey || event.metaKey ? undefined : nudged(place, event.key, event.shiftKey)
    if (to !== undefined) onMove(endsFor(to))
    else if (event.key === 'Enter' || event.key === ' ' || event.key === 'F2') onOpen(event.currentTarget)
    else if (event.key === 'Delete' || event.key === 'Backspace') onRemove()
    else return
    event.preventDefault()
    event.stopPropagation()
  }
  return (
    <button
      type="button"
      className={className}
      style={placeStyle(place)}
      aria-label={label}
      data-callout={id}
      onKeyDown={onKeyDown}
      {...drag}
    >
      {children}
    </button>
  )
}

const clamp = (value: number): number => Math.max(0, Math.min(10_000, value))

/** Whole and tenth per cents, for the ear. */
const percents = ({ x, y }: Place) => ({ x: Math.round(x / 10) / 10, y: Math.round(y / 10) / 10 })
