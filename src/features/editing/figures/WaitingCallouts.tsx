import type { KeyboardEvent, RefObject } from 'react'
import { useTranslation } from 'react-i18next'
import type { Callout, Place } from '../../../../shared/guide/schema'
import { useDraft } from '../draftStore'
import { PartBalloon } from '../fields/PartBalloon'
import { useCalloutName } from './useCalloutName'
import { useHandleDrag } from './useHandleDrag'

export interface WaitingCalloutsProps {
  callouts: readonly Callout[]
  plate: RefObject<HTMLElement | null>
  onMoving: (callout: Callout, on: Place | null) => void
  onPlace: (callout: Callout, on: Place) => void
  onRemove: (callout: Callout) => void
}

const MIDDLE: Place = { x: 5000, y: 5000 }

/** Callouts that have no place yet: drag them on to their part, or press them to put them into the middle. */
export function WaitingCallouts({ callouts, ...acts }: WaitingCalloutsProps) {
  const { t, i18n } = useTranslation('editingFigures')
  const { numbers } = useDraft()
  const names = callouts.map((callout) =>
    callout.shape === 'balloon' ? String(numbers.line[callout.line] ?? '?') : t(`callout.${callout.shape}`),
  )
  const list = new Intl.ListFormat(i18n.language).format(names)
  return (
    <div className="waiting-callouts">
      <span>
        {callouts.map((callout) => (
          <Waiting key={callout.id} callout={callout} {...acts} />
        ))}
      </span>
      <p className="note">{t('callout.waiting', { count: callouts.length, list })}</p>
    </div>
  )
}

function Waiting({
  callout,
  plate,
  onMoving,
  onPlace,
  onRemove,
}: Omit<WaitingCalloutsProps, 'callouts'> & { callout: Callout }) {
  const { t } = useTranslation('editingFigures')
  const { readOnly } = useDraft()
  const nameOf = useCalloutName()
  const drag = useHandleDrag(plate, {
    onMoving: (on) => onMoving(callout, on),
    onDrop: (on, onPicture) => (onPicture ? onPlace(callout, on) : onMoving(callout, null)),
    onPress: () => onPlace(callout, MIDDLE),
  })
  const onKeyDown = (event: KeyboardEvent): void => {
    if (event.key === 'Enter' || event.key === ' ') onPlace(callout, MIDDLE)
    else if (event.key === 'Delete' || event.key === 'Backspace') onRemove(callout)
    else return
    event.preventDefault()
  }
  return (
    <button
      type="button"
      className="waiting-callout"
      aria-label={t('callout.place', { name: nameOf(callout) })}
      data-callout={callout.id}
      disabled={readOnly}
      onKeyDown={onKeyDown}
      {...drag}
    >
      {callout.shape === 'balloon' ? (
        <PartBalloon line={callout.line} waiting />
      ) : (
        <span className="dt">{t(`callout.${callout.shape}`)}</span>
      )}
    </button>
  )
}
