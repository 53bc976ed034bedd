import { createContext, useContext, useState, type ReactNode } from 'react'
import { useTranslation } from 'react-i18next'
import {
  DndContext,
  DragOverlay,
  PointerSensor,
  pointerWithin,
  useDraggable,
  useDroppable,
  useSensor,
  useSensors,
  type Active,
  type DragMoveEvent,
  type Over,
} from '@dnd-kit/core'
import { GripVertical } from 'lucide-react'
import type { Id } from '../../../../shared/lib/ids/id'
import type { Drop } from './moveInOutline'

interface Row {
  kind: 'step' | 'section'
  id: Id
  title: string
}

/** Where the dragged row would land: above or below which row. */
const Landing = createContext<{ id: Id; before: boolean } | null>(null)

const rowOf = ({ data }: Active | Over): Row => data.current as Row

function landingOf({ active, over, delta, activatorEvent }: DragMoveEvent): Drop | null {
  if (over === null || over.id === active.id || !(activatorEvent instanceof PointerEvent)) return null
  const y = activatorEvent.clientY + delta.y
  const on = rowOf(over)
  const { kind, id } = rowOf(active)
  return { kind, id, on, before: y < over.rect.top + over.rect.height / 2 }
}

/**
 * Dragging rows of the outline by their grips, with mouse, pen or finger. A line shows where the row will land; nothing moves until
 * it is let go. By keyboard rows move with Alt and the arrow keys, or by their menu.
 */
export function OutlineDrag({ onDrop, children }: { onDrop: (drop: Drop) => void; children: ReactNode }) {
  const { t } = useTranslation('editing')
  const sensors = useSensors(useSensor(PointerSensor, { activationConstraint: { distance: 4 } }))
  const [dragged, setDragged] = useState<Row | null>(null)
  const [landing, setLanding] = useState<Drop | null>(null)
  const stop = (): void => {
    setDragged(null)
    setLanding(null)
  }
  const silent = (): undefined => undefined
  return (
    <DndContext
      sensors={sensors}
      collisionDetection={pointerWithin}
      onDragStart={({ active }) => setDragged(rowOf(active))}
      onDragMove={(event) => setLanding(landingOf(event))}
      onDragCancel={stop}
      onDragEnd={() => {
        if (landing !== null) onDrop(landing)
        stop()
      }}
      // The acts announce themselves, from the keyboard too.
      accessibility={{
        announcements: { onDragStart: silent, onDragOver: silent, onDragEnd: silent, onDragCancel: silent },
        screenReaderInstructions: { draggable: t('outline.dragHint') },
      }}
    >
      <Landing.Provider value={landing && { id: landing.on.id, before: landing.before }}>
        {children}
      </Landing.Provider>
      <DragOverlay dropAnimation={null}>
        {dragged && <div className="outline-dragged">{dragged.title}</div>}
      </DragOverlay>
    </DndContext>
  )
}

/** A row that can be dragged and dropped on: its grip, and the attributes of the row. */
export function useRowDrag(row: Row): {
  setNode: (node: HTMLElement | null) => void
  grip: ReactNode
  landing: string | undefined
} {
  const { t } = useTranslation('editing')
  const { setNodeRef: setGrip, listeners, isDragging } = useDraggable({ id: row.id, data: row })
  const { setNodeRef } = useDroppable({ id: row.id, data: row })
  const landing = useContext(Landing)
  const grip = (
    // Not a tab stop: by keyboard the row itself moves.
    <span
      className="grip"
      ref={setGrip}
      {...listeners}
      title={t('outline.drag')}
      aria-hidden
      data-dragging={isDragging || undefined}
    >
      <GripVertical size={16} />
    </span>
  )
  return {
    setNode: setNodeRef,
    grip,
    landing: landing?.id === row.id ? (landing.before ? 'before' : 'after') : undefined,
  }
}
