import { useRef, useState } from 'react'
import { useTranslation } from 'react-i18next'
import { insertNode, removeNode, setNode } from '../../../../shared/guide/edit'
import type { Callout, Condition, Figure, Place } from '../../../../shared/guide/schema'
import type { Id } from '../../../../shared/lib/ids/id'
import { CalloutLines } from '../../../components/reading/CalloutLines'
import { Menu } from '../../../components/controls/Menu'
import { useDraft } from '../draftStore'
import { PartBalloon } from '../fields/PartBalloon'
import { useOpenDraft } from '../frame/sessionContext'
import { CalloutForm } from './CalloutForm'
import { CalloutHandles } from './CalloutHandles'
import { FigurePicture, usePicture } from './FigurePicture'
import { droppedOn } from './places'
import { WaitingCallouts } from './WaitingCallouts'

/** While something is dragged it is drawn where the pointer is; the document changes once, when it is let go. */
interface Moving {
  id: Id
  at: Place
  tip: Place | null
}

/** A picture with its callouts over it, and those that still wait beside it. */
export function FigurePlate({ figure, when }: { figure: Figure; when: Condition | undefined }) {
  const { t } = useTranslation('editingFigures')
  const { document, edit, newId, readOnly, announce } = useDraft()
  const { sayDone } = useOpenDraft()
  const { ratio, address } = usePicture(figure)
  const plate = useRef<HTMLDivElement>(null)
  const [moving, setMoving] = useState<Moving | null>(null)
  const [open, setOpen] = useState<{ id: Id; anchor: Element } | null>(null)
  const used = new Set(figure.callouts.map((callout) => (callout.shape === 'balloon' ? callout.line : '')))
  const shown = figure.callouts.map((callout) =>
    callout.id === moving?.id ? { ...callout, at: moving.at, tip: moving.tip } : callout,
  )
  const waiting = figure.callouts.filter(({ at }) => at === null)

  const set = (id: Id, patch: Partial<Callout>, field: string): void =>
    edit((doc) => setNode(doc, 'callout', id, patch), `callout.${field}.${id}`)
  const place = (callout: Callout, on: Place): void => {
    setMoving(null)
    set(callout.id, droppedOn(callout.shape, on), 'place')
    announce(t('callout.placed'))
    setTimeout(() => focusHandle(callout.id))
  }
  const remove = (callout: Callout): void => {
    const index = figure.callouts.indexOf(callout)
    const next = figure.callouts[index + 1] ?? figure.callouts[index - 1]
    edit((doc) => removeNode(doc, 'callout', callout.id))
    setOpen(null)
    sayDone(t('callout.removed'))
    if (next !== undefined) setTimeout(() => focusHandle(next.id))
  }
  const add = (callout: Callout): void => {
    edit((doc) => insertNode(doc, 'callout', callout, figure.id))
    setTimeout(() => focusHandle(callout.id))
  }
  const addMark = (shape: 'arrow' | 'dimension' | 'area'): void => {
    const id = newId()
    const ends = droppedOn(shape, { x: 5000, y: 5000 })
    if (shape === 'dimension') add({ id, shape, ...ends, value: { value: '0', unit: 'mm' } })
    else add({ id, shape, ...ends })
    setTimeout(() => {
      const anchor = handleOf(id)
      if (anchor !== null) setOpen({ id, anchor })
    })
  }
  const opened = figure.callouts.find(({ id }) => id === open?.id)

  return (
    <div className="figure-slot">
      <div className="plate" dir="ltr" ref={plate}>
        <FigurePicture figure={figure} />
        <CalloutLines callouts={shown} ratio={ratio} />
        {shown.map((callout) => (
          <CalloutHandles
            key={callout.id}
            callout={callout}
            when={when}
            plate={plate}
            onMoving={(ends) => setMoving(ends && { id: callout.id, ...ends })}
            onMove={(ends) => {
              setMoving(null)
              set(callout.id, ends, 'place')
            }}
            onOpen={(anchor) => setOpen({ id: callout.id, anchor })}
            onRemove={() => remove(callout)}
          />
        ))}
      </div>
      {waiting.length > 0 && (
        <WaitingCallouts
          callouts={waiting}
          plate={plate}
          onMoving={(callout, on) =>
            setMoving(on === null ? null : { id: callout.id, ...droppedOn(callout.shape, on) })
          }
          onPlace={place}
          onRemove={remove}
        />
      )}
      {!readOnly && address !== null && (
        <div className="callout-acts" role="group" aria-label={t('callout.put')}>
          <span aria-hidden>{t('callout.put')}</span>
          <Menu
            kind="plain"
            actions={
              document.lines.length === 0
                ? [{ id: 'none', label: t('callout.noLines'), disabled: true, onAction: () => undefined }]
                : document.lines.map((line) => ({
                    id: line.id,
                    text: line.options[0]!.part.name,
                    disabled: used.has(line.id),
                    label: (
                      <span className="choice-of-line">
                        <PartBalloon line={line.id} when={when} />
                        <span dir="auto">{line.options[0]!.part.name}</span>
                      </span>
                    ),
                    onAction: () =>
                      add({ id: newId(), shape: 'balloon', at: null, tip: null, line: line.id }),
                  }))
            }
          >
            {t('callout.balloon')}
          </Menu>
          {(['arrow', 'dimension', 'area'] as const).map((shape) => (
            <button key={shape} type="button" onClick={() => addMark(shape)}>
              {t(`callout.${shape}`)}
            </button>
          ))}
        </div>
      )}
      {open !== null && opened !== undefined && (
        <CalloutForm
          callout={opened}
          anchor={open.anchor}
          onSet={(patch, field) => set(opened.id, patch, field)}
          onRemove={() => remove(opened)}
          onClose={() => setOpen(null)}
        />
      )}
    </div>
  )
}

const handleOf = (id: Id): HTMLElement | null =>
  window.document.querySelector<HTMLElement>(`[data-callout="${CSS.escape(id)}"]`)

const focusHandle = (id: Id): void => handleOf(id)?.focus({ preventScroll: true })
