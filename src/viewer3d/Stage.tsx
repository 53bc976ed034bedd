import { useThree } from '@react-three/fiber'
import { useEffect, useLayoutEffect, useRef } from 'react'
import { Box3, OrthographicCamera, type DirectionalLight } from 'three'
import { OrbitControls } from 'three/examples/jsm/controls/OrbitControls.js'
import { fit, stand, STANDPOINTS, turn, zoom, type Standpoint } from './camera'
import type { Model } from './loadModel'
import { Outline } from './Outline'
import type { Ink } from './useInk'

/** What the buttons and keys of the view can do. */
export interface Handle {
  fit: () => void
  zoom: (factor: number) => void
  turn: (round: number, up: number) => void
  stand: (from: Standpoint) => void
}

interface StageProps {
  model: Model
  ink: Ink
  label: string
  describedBy: string
  onReady: (handle: Handle) => void
  onLost: () => void
}

/** The solid with matt faces and ink on its edges, a light that goes with the onlooker, and the controls on the canvas. */
export function Stage({ model, ink, label, describedBy, onReady, onLost }: StageProps) {
  const canvas = useThree((state) => state.gl.domElement)
  const camera = useThree((state) => state.camera)
  const invalidate = useThree((state) => state.invalidate)
  const size = useThree((state) => state.size)
  const light = useRef<DirectionalLight>(null)
  const refit = useRef<() => void>(undefined)

  useLayoutEffect(() => {
    canvas.setAttribute('role', 'img')
    canvas.setAttribute('aria-label', label)
    canvas.setAttribute('aria-describedby', describedBy)
    canvas.setAttribute('tabindex', '0')
  }, [canvas, label, describedBy])

  useEffect(() => {
    const lost = (event: Event): void => {
      event.preventDefault()
      onLost()
    }
    canvas.addEventListener('webglcontextlost', lost)
    return () => canvas.removeEventListener('webglcontextlost', lost)
  }, [canvas, onLost])

  useEffect(() => {
    if (!(camera instanceof OrthographicCamera)) return
    camera.up.set(0, 0, 1)
    const controls = new OrbitControls(camera, canvas)
    const box = model.surface.boundingBox ?? new Box3()
    const moved = (): void => {
      light.current?.position.copy(camera.position).sub(controls.target)
      invalidate()
    }
    controls.addEventListener('change', moved)
    // The wheel belongs to the page until the view has the focus, so that scrolling past it does not get caught.
    controls.enableZoom = false
    const zoomable = (): void => {
      controls.enableZoom = true
    }
    const scrollable = (): void => {
      controls.enableZoom = false
    }
    const take = (): void => canvas.focus({ preventScroll: true })
    canvas.addEventListener('focus', zoomable)
    canvas.addEventListener('blur', scrollable)
    canvas.addEventListener('pointerdown', take)
    refit.current = () => {
      fit(camera, controls, box)
      moved()
    }
    stand(camera, controls, box, STANDPOINTS.start)
    moved()
    const after = (change: () => void) => (): void => {
      change()
      moved()
    }
    onReady({
      fit: after(() => fit(camera, controls, box)),
      zoom: (factor) => after(() => zoom(camera, controls, factor))(),
      turn: (round, up) => after(() => turn(camera, controls, round, up))(),
      stand: (from) => after(() => stand(camera, controls, box, from))(),
    })
    return () => {
      canvas.removeEventListener('focus', zoomable)
      canvas.removeEventListener('blur', scrollable)
      canvas.removeEventListener('pointerdown', take)
      controls.dispose()
    }
  }, [camera, canvas, invalidate, model, onReady])

  useEffect(() => refit.current?.(), [size.width, size.height])
  useEffect(() => invalidate(), [ink, invalidate])

  return (
    <>
      <hemisphereLight args={[0xffffff, 0xb0b0b0, 3]} position={[0, 0, 1]} />
      <directionalLight ref={light} intensity={1.2} />
      <mesh geometry={model.surface}>
        <meshLambertMaterial color={ink.stone} polygonOffset polygonOffsetFactor={1} polygonOffsetUnits={1} />
      </mesh>
      <lineSegments geometry={model.edges}>
        <lineBasicMaterial color={ink.ink} />
      </lineSegments>
      <Outline geometry={model.hull} color={ink.ink} />
    </>
  )
}
