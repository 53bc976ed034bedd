import type { Callout, Place } from '../../../../shared/guide/schema'

/** The whole width or height of a picture, in hundredths of a per cent. */
const WHOLE = 10_000

const within = (value: number): number => Math.max(0, Math.min(WHOLE, Math.round(value)))

/** The place under a pointer; outside of the picture the nearest one at its edge. */
export function placeUnder(
  box: { left: number; top: number; width: number; height: number },
  x: number,
  y: number,
): Place {
  if (box.width <= 0 || box.height <= 0) return { x: WHOLE / 2, y: WHOLE / 2 }
  return { x: within(((x - box.left) / box.width) * WHOLE), y: within(((y - box.top) / box.height) * WHOLE) }
}

const ARROWS: Record<string, readonly [number, number]> = {
  ArrowLeft: [-1, 0],
  ArrowRight: [1, 0],
  ArrowUp: [0, -1],
  ArrowDown: [0, 1],
}

/** An arrow key moves by one per cent, with Shift by a tenth. Left is left in every direction of writing, as the picture is. */
export function nudged(place: Place, key: string, fine: boolean): Place | undefined {
  const arrow = ARROWS[key]
  if (arrow === undefined) return undefined
  const step = fine ? 10 : 100
  return { x: within(place.x + arrow[0] * step), y: within(place.y + arrow[1] * step) }
}

/**
 * Both ends of a callout that is dropped on a place. A balloon points at the place and stands beside it, away from the middle, where there
 * is mostly room.
 */
export function droppedOn(shape: Callout['shape'], on: Place): { at: Place; tip: Place } {
  const outwards = on.x < WHOLE / 2 ? -1 : 1
  const beside = (dx: number, dy: number): Place => {
    const x = on.x + outwards * dx
    return {
      x: within(x < 400 || x > WHOLE - 400 ? on.x - outwards * dx : x),
      y: within(Math.max(400, on.y - dy)),
    }
  }
  switch (shape) {
    case 'balloon':
    case 'arrow':
      return { at: beside(1400, 1000), tip: on }
    case 'dimension':
      return { at: { x: within(on.x - 1000), y: on.y }, tip: { x: within(on.x + 1000), y: on.y } }
    case 'area':
      return {
        at: { x: within(on.x - 1000), y: within(on.y - 1000) },
        tip: { x: within(on.x + 1000), y: within(on.y + 1000) },
      }
  }
}
