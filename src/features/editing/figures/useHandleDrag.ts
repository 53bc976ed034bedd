import { useRef, type PointerEvent, type RefObject } from 'react'
import type { Place } from '../../../../shared/guide/schema'
import { placeUnder } from './places'

export interface HandleDrag {
  onPointerDown: (event: PointerEvent<HTMLElement>) => void
  onPointerMove: (event: PointerEvent<HTMLElement>) => void
  onPointerUp: (event: PointerEvent<HTMLElement>) => void
  onPointerCancel: () => void
}

/** Below this a press is a press and no drag, in pixels: a finger never keeps quite still. */
const SLACK = 4

/**
 * Drags something over a picture with mouse, pen or finger. What is under the pointer at first stays under it: a press beside the middle of a balloon
 * does not make it jump.
 */
export function useHandleDrag(
  plate: RefObject<HTMLElement | null>,
  acts: {
    onMoving: (place: Place | null) => void
    onDrop: (place: Place, onPicture: boolean) => void
    onPress?: (anchor: HTMLElement) => void
  },
): HandleDrag {
  const drag = useRef<{ x: number; y: number; dx: number; dy: number; moved: boolean } | null>(null)
  const placeOf = (event: PointerEvent): Place | null => {
    const box = plate.current?.getBoundingClientRect()
    const { dx, dy } = drag.current ?? { dx: 0, dy: 0 }
    return box === undefined ? null : placeUnder(box, event.clientX - dx, event.clientY - dy)
  }
  return {
    onPointerDown: (event) => {
      if (event.button !== 0) return
      event.currentTarget.setPointerCapture(event.pointerId)
      const box = event.currentTarget.getBoundingClientRect()
      drag.current = {
        x: event.clientX,
        y: event.clientY,
        dx: event.clientX - (box.left + box.width / 2),
        dy: event.clientY - (box.top + box.height / 2),
        moved: false,
      }
    },
    onPointerMove: (event) => {
      const now = drag.current
      if (now === null) return
      if (Math.hypot(event.clientX - now.x, event.clientY - now.y) > SLACK) now.moved = true
      if (now.moved) acts.onMoving(placeOf(event))
    },
    onPointerUp: (event) => {
      const now = drag.current
      const place = placeOf(event)
      drag.current = null
      if (now === null) return
      if (!now.moved || place === null) return acts.onPress?.(event.currentTarget)
      const box = plate.current!.getBoundingClientRect()
      const onPicture =
        event.clientX >= box.left &&
        event.clientX <= box.right &&
        event.clientY >= box.top &&
        event.clientY <= box.bottom
      acts.onDrop(place, onPicture)
    },
    onPointerCancel: () => {
      drag.current = null
      acts.onMoving(null)
    },
  }
}
