import type { Callout, Place } from '../../../shared/guide/schema'

/** A callout that has been placed. */
export type Placed = Callout & { at: Place }

export const placedOf = (callouts: readonly Callout[]): Placed[] =>
  callouts.flatMap((callout) => (callout.at === null ? [] : [{ ...callout, at: callout.at }]))

/** Where the words of a callout stand: a dimension's figure in the gap of its line, all others at their own place. */
export function wordsPlace({ shape, at, tip }: Placed): Place {
  return shape === 'dimension' && tip !== null
    ? { x: Math.round((at.x + tip.x) / 2), y: Math.round((at.y + tip.y) / 2) }
    : at
}

/** The slope of a line over a picture as it is seen, in degrees, clockwise from the right. `ratio` is the picture's width over its height. */
export function slopeOf(from: Place, to: Place, ratio: number): number {
  const degrees = (Math.atan2((to.y - from.y) / ratio, to.x - from.x) * 180) / Math.PI
  return Math.round(degrees * 10) / 10
}

/** Places are never mirrored: a picture is the same in every direction of writing. */
export const placeStyle = ({ x, y }: Place) => ({ left: `${x / 100}%`, top: `${y / 100}%` })
