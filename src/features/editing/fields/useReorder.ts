import { useRef, useState, type PointerEvent } from 'react'
import type { Id } from '../../../../shared/lib/ids/id'

interface Dragging {
  id: Id
  /** The row over or under which the dragged one would land. */
  on: Id | null
  before: boolean
}

export interface Reorder {
  /** For the grip of a row. It is no stop of the Tab key: by keyboard rows move with Alt and the arrows. */
  grip: (id: Id) => {
    onPointerDown: (event: PointerEvent) => void
    onPointerMove: (event: PointerEvent) => void
    onPointerUp: () => void
    onPointerCancel: () => void
    'data-dragging': true | undefined
    'aria-hidden': true
  }
  /** For the row itself. */
  row: (id: Id) => { 'data-reorder': Id; 'data-landing': 'before' | 'after' | undefined }
}

/**
 * Rows that change places by dragging a grip with mouse, pen or finger. Nothing moves until it is let go; a line shows where it will land.
 * @param move called with the row and the place that it then has, counted without itself.
 */
export function useReorder(ids: readonly Id[], move: (id: Id, to: number) => void): Reorder {
  const [dragging, setDragging] = useState<Dragging | null>(null)
  const list = useRef<Element | null>(null)

  const look = (event: PointerEvent): void => {
    if (dragging === null) return
    const rows = [...(list.current?.querySelectorAll('[data-reorder]') ?? [])].filter((row) =>
      ids.includes(row.getAttribute('data-reorder') ?? ''),
    )
    const boxes = rows.map((row) => ({
      id: row.getAttribute('data-reorder')!,
      box: row.getBoundingClientRect(),
    }))
    const under = boxes.find(({ box }) => event.clientY < box.bottom) ?? boxes.at(-1)
    if (under === undefined) return
    const before = event.clientY < under.box.top + under.box.height / 2
    setDragging({ ...dragging, on: under.id === dragging.id ? null : under.id, before })
  }
  const drop = (): void => {
    setDragging(null)
    if (dragging === null || dragging.on === null) return
    const rest = ids.filter((id) => id !== dragging.id)
    move(dragging.id, rest.indexOf(dragging.on) + (dragging.before ? 0 : 1))
  }
  return {
    grip: (id) => ({
      onPointerDown: (event) => {
        if (event.button !== 0) return
        event.preventDefault()
        event.currentTarget.setPointerCapture(event.pointerId)
        list.current = event.currentTarget.closest('[data-reorder]')?.parentElement ?? null
        setDragging({ id, on: null, before: false })
      },
      onPointerMove: look,
      onPointerUp: drop,
      onPointerCancel: () => setDragging(null),
      'data-dragging': dragging?.id === id || undefined,
      'aria-hidden': true,
    }),
    row: (id) => ({
      'data-reorder': id,
      'data-landing': dragging?.on === id ? (dragging.before ? 'before' : 'after') : undefined,
    }),
  }
}
