import { useEffect, useRef, useState, type DragEvent } from 'react'
import type { Editor } from '@tiptap/core'
import { NodeSelection } from '@tiptap/pm/state'

/**
 * A grip in the margin beside the instruction under the pointer, to drag it to another place. For the mouse only: by keyboard it is Alt with
 * the arrow up or down, by touch the two arrows over the text.
 */
export function ItemGrip({ editor }: { editor: Editor }) {
  const [item, setItem] = useState<{ element: HTMLElement; top: number } | null>(null)
  const grip = useRef<HTMLSpanElement>(null)
  useEffect(() => {
    const place = editor.view.dom.parentElement?.parentElement
    if (place === null || place === undefined) return
    const move = (event: PointerEvent): void => {
      if (event.pointerType !== 'mouse' || event.target === grip.current) return
      const under = event.target instanceof Element ? event.target.closest('li') : null
      if (!(under instanceof HTMLElement) || !editor.view.dom.contains(under)) return setItem(null)
      const top = under.getBoundingClientRect().top - place.getBoundingClientRect().top
      setItem((now) => (now?.element === under && now.top === top ? now : { element: under, top }))
    }
    const leave = (): void => setItem(null)
    place.addEventListener('pointermove', move)
    place.addEventListener('pointerleave', leave)
    return () => {
      place.removeEventListener('pointermove', move)
      place.removeEventListener('pointerleave', leave)
    }
  }, [editor])
  if (item === null || !editor.isEditable) return null
  return (
    <span
      ref={grip}
      className="item-grip"
      aria-hidden
      draggable
      style={{ top: item.top }}
      onDragStart={(event) => startDrag(event, editor, item.element)}
      onDragEnd={() => endDrag(editor)}
    />
  )
}

function startDrag(event: DragEvent, { view }: Editor, item: HTMLElement): void {
  const pos = view.posAtDOM(item, 0) - 1
  if (view.state.doc.nodeAt(pos)?.type.name !== 'listItem') return event.preventDefault()
  const selection = NodeSelection.create(view.state.doc, pos)
  view.dispatch(view.state.tr.setSelection(selection))
  view.dragging = { slice: selection.content(), move: true }
  event.dataTransfer.effectAllowed = 'move'
  event.dataTransfer.setData('text/plain', selection.node.textContent)
  event.dataTransfer.setDragImage(item, 0, 0)
}

function endDrag({ view }: Editor): void {
  view.dragging = null
}
