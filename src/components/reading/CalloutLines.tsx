import type { Callout } from '../../../shared/guide/schema'
import { placedOf, placeStyle, slopeOf, type Placed } from './calloutShape'

/**
 * The lines of callouts over a picture: a leader with a dot on the part, an arrow with its head, a dimension line with its two ticks, an area's
 * frame. Strokes, dots and ticks keep their size at every width of the picture. The words are set over it by the caller.
 */
export function CalloutLines({ callouts, ratio }: { callouts: readonly Callout[]; ratio: number }) {
  const placed = placedOf(callouts)
  return (
    <>
      <svg className="leaders" viewBox="0 0 10000 10000" preserveAspectRatio="none" aria-hidden="true">
        {placed.map((callout) => (
          <Stroke key={callout.id} callout={callout} />
        ))}
      </svg>
      {placed.map((callout) => (
        <Ends key={callout.id} callout={callout} ratio={ratio} />
      ))}
    </>
  )
}

function Stroke({ callout: { at, tip, shape } }: { callout: Placed }) {
  if (tip === null) return null
  if (shape !== 'area') return <path className="l0" d={`M${at.x} ${at.y}L${tip.x} ${tip.y}`} />
  const [width, height] = [Math.abs(at.x - tip.x), Math.abs(at.y - tip.y)]
  return (
    <rect className="l2" x={Math.min(at.x, tip.x)} y={Math.min(at.y, tip.y)} width={width} height={height} />
  )
}

function Ends({ callout: { at, tip, shape }, ratio }: { callout: Placed; ratio: number }) {
  if (tip === null || shape === 'area') return null
  if (shape === 'balloon') return <i className="callout-dot" style={placeStyle(tip)} aria-hidden />
  const slope = slopeOf(at, tip, ratio)
  const turned = (place: Placed['at']) => ({ ...placeStyle(place), rotate: `${slope}deg` })
  if (shape === 'arrow') return <i className="callout-head" style={turned(tip)} aria-hidden />
  return (
    <>
      <i className="callout-tick" style={turned(at)} aria-hidden />
      <i className="callout-tick" style={turned(tip)} aria-hidden />
    </>
  )
}
