import { Canvas } from '@react-three/fiber'
import { useCallback, useId, useState, type KeyboardEvent } from 'react'
import { Stage, type Handle } from './Stage'
import type { ViewerStrings } from './strings'
import { useInk } from './useInk'
import { useModel } from './useModel'
import './viewer.css'
import { TURN_DEGREES, ViewTools, ZOOM_STEP } from './ViewTools'

export interface ModelViewerProps {
  /** Address of the model's preview, a GLB. */
  src: string
  /** What the picture shows, for those who cannot see it: "Runner, pitch 240 mm". */
  label: string
  strings: ViewerStrings
  /** Escape and a button call it; without it there is nothing to close. */
  onClose?: () => void
}

/** A solid to be turned, brought nearer and moved, by mouse, touch, keyboard and buttons. */
export function ModelViewer({ src, label, strings, onClose }: ModelViewerProps) {
  const [hasWebgl] = useState(webglWorks)
  const [attempt, setAttempt] = useState(0)
  const [lost, setLost] = useState(false)
  const [handle, setHandle] = useState<Handle>()
  const instructions = useId()
  const ink = useInk()
  const loaded = useModel(src, attempt)
  const showLost = useCallback(() => setLost(true), [])
  const again = (): void => {
    setLost(false)
    setHandle(undefined)
    setAttempt((count) => count + 1)
  }
  const shown = hasWebgl && !lost && loaded.state === 'ready'
  const trouble = troubleOf(hasWebgl, lost, loaded.state)

  return (
    <div
      className="viewer"
      onKeyDown={(event) => {
        if (event.key === 'Escape' && onClose !== undefined) onClose()
        else if (event.target instanceof HTMLCanvasElement && handle !== undefined) steer(event, handle)
      }}
    >
      <div className="viewer-stage">
        {shown && (
          <Canvas
            orthographic
            frameloop="demand"
            dpr={[1, 2]}
            gl={{ antialias: true, alpha: true, powerPreference: 'low-power' }}
          >
            <Stage
              model={loaded.model}
              ink={ink}
              label={label}
              describedBy={instructions}
              onReady={setHandle}
              onLost={showLost}
            />
          </Canvas>
        )}
        {trouble === undefined && loaded.state === 'loading' && (
          <label className="viewer-wait">
            {strings.loading}
            <progress max={1} {...(loaded.share > 0 && { value: loaded.share })} />
          </label>
        )}
        {trouble !== undefined && (
          <div className="viewer-wait" role="alert">
            <p>{strings[trouble]}</p>
            {(trouble === 'failed' || trouble === 'lost') && (
              <button type="button" className="viewer-button" onClick={again}>
                {strings.retry}
              </button>
            )}
          </div>
        )}
      </div>
      <ViewTools handle={shown ? handle : undefined} strings={strings} onClose={onClose} />
      <p className="viewer-instructions" id={instructions}>
        {strings.instructions}
      </p>
      <p className="viewer-unseen" role="status">
        {shown ? strings.ready : ''}
      </p>
    </div>
  )
}

type Trouble = 'noWebgl' | 'lost' | 'failed' | 'damaged'

function troubleOf(hasWebgl: boolean, lost: boolean, state: string): Trouble | undefined {
  if (!hasWebgl) return 'noWebgl'
  if (lost) return 'lost'
  return state === 'failed' || state === 'damaged' ? state : undefined
}

/** Keys on the canvas. Others pass through, so that Tab goes on and the page still scrolls by its own keys. */
function steer(event: KeyboardEvent, handle: Handle): void {
  if (event.ctrlKey || event.metaKey || event.altKey) return
  const acts: Record<string, () => void> = {
    ArrowLeft: () => handle.turn(-TURN_DEGREES, 0),
    ArrowRight: () => handle.turn(TURN_DEGREES, 0),
    ArrowUp: () => handle.turn(0, TURN_DEGREES),
    ArrowDown: () => handle.turn(0, -TURN_DEGREES),
    '+': () => handle.zoom(ZOOM_STEP),
    '=': () => handle.zoom(ZOOM_STEP),
    '-': () => handle.zoom(1 / ZOOM_STEP),
    '0': handle.fit,
  }
  const act = acts[event.key]
  if (act === undefined) return
  event.preventDefault()
  act()
}

function webglWorks(): boolean {
  const context = document.createElement('canvas').getContext('webgl2')
  // Browsers allow few contexts at once: this one is given back.
  context?.getExtension('WEBGL_lose_context')?.loseContext()
  return context !== null
}
