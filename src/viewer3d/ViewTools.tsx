import { Maximize, Minus, Plus, RotateCcw, RotateCw, X } from 'lucide-react'
import type { ReactNode } from 'react'
import { STANDPOINTS } from './camera'
import type { Handle } from './Stage'
import type { ViewerStrings } from './strings'

export const TURN_DEGREES = 15
export const ZOOM_STEP = 1.25

interface ViewToolsProps {
  handle: Handle | undefined
  strings: ViewerStrings
  onClose?: () => void
}

/** Everything that dragging can do, as buttons. */
export function ViewTools({ handle, strings, onClose }: ViewToolsProps) {
  const button = (label: string, act: ((handle: Handle) => void) | undefined, content: ReactNode) => (
    <button
      type="button"
      className="viewer-button"
      title={label}
      aria-label={label}
      disabled={handle === undefined}
      onClick={() => handle !== undefined && act?.(handle)}
    >
      {content}
    </button>
  )
  const icon = { size: 18, strokeWidth: 1.6, 'aria-hidden': true } as const
  return (
    <div className="viewer-tools" role="group" aria-label={strings.tools}>
      {button(strings.fit, ({ fit }) => fit(), <Maximize {...icon} />)}
      {button(strings.zoomIn, ({ zoom }) => zoom(ZOOM_STEP), <Plus {...icon} />)}
      {button(strings.zoomOut, ({ zoom }) => zoom(1 / ZOOM_STEP), <Minus {...icon} />)}
      {button(strings.turnLeft, ({ turn }) => turn(-TURN_DEGREES, 0), <RotateCw {...icon} />)}
      {button(strings.turnRight, ({ turn }) => turn(TURN_DEGREES, 0), <RotateCcw {...icon} />)}
      {(['top', 'front', 'side'] as const).map((view) => (
        <button
          key={view}
          type="button"
          className="viewer-button"
          disabled={handle === undefined}
          onClick={() => handle?.stand(STANDPOINTS[view])}
        >
          {strings[view]}
        </button>
      ))}
      {onClose !== undefined && (
        <button
          type="button"
          className="viewer-button viewer-close"
          title={strings.close}
          aria-label={strings.close}
          onClick={onClose}
        >
          <X {...icon} />
        </button>
      )}
    </div>
  )
}
