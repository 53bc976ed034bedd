import { Box3, EventDispatcher, OrthographicCamera, Vector3 } from 'three'
import type { OrbitControls } from 'three/examples/jsm/controls/OrbitControls.js'
import { describe, expect, test } from 'vitest'
import { fit, stand, STANDPOINTS, turn, zoom } from './camera'

/** The controls as far as the camera needs them: where they look. */
function setUp() {
  const camera = new OrthographicCamera(-200, 200, 100, -100)
  camera.up.set(0, 0, 1)
  const controls = Object.assign(new EventDispatcher(), {
    target: new Vector3(),
    update: () => camera.lookAt(controls.target),
  }) as unknown as OrbitControls
  const box = new Box3(new Vector3(10, 20, 30), new Vector3(40, 30, 90))
  return { camera, controls, box }
}

const corners = ({ min, max }: Box3): Vector3[] =>
  [0, 1, 2, 3, 4, 5, 6, 7].map(
    (index) => new Vector3(index & 1 ? max.x : min.x, index & 2 ? max.y : min.y, index & 4 ? max.z : min.z),
  )

describe.each(Object.entries(STANDPOINTS))('from %s', (name, from) => {
  test('the whole box is in the picture and fills it one way', () => {
    const { camera, controls, box } = setUp()
    stand(camera, controls, box, from)
    camera.updateMatrixWorld(true)
    const seen = corners(box).map((corner) => corner.project(camera))
    const reach = (axis: 'x' | 'y'): number => Math.max(...seen.map((place) => Math.abs(place[axis])))
    expect(Math.max(reach('x'), reach('y'))).toBeLessThanOrEqual(1)
    expect(Math.max(reach('x'), reach('y'))).toBeGreaterThan(0.85)
    expect(Math.max(...seen.map((place) => Math.abs(place.z)))).toBeLessThan(1)
    if (name === 'front') expect(camera.getWorldDirection(new Vector3()).y).toBeCloseTo(1)
    if (name === 'top') expect(camera.getWorldDirection(new Vector3()).z).toBeCloseTo(-1, 5)
  })
})

test('turning right and left again comes back; turning up stops overhead', () => {
  const { camera, controls, box } = setUp()
  stand(camera, controls, box, STANDPOINTS.start)
  const before = camera.position.clone()
  turn(camera, controls, 15, 10)
  expect(camera.position.distanceTo(before)).toBeGreaterThan(1)
  expect(camera.position.z).toBeGreaterThan(before.z)
  turn(camera, controls, -15, -10)
  expect(camera.position.distanceTo(before)).toBeLessThan(1e-9)
  for (let press = 0; press < 20; press++) turn(camera, controls, 0, 15)
  expect(camera.getWorldDirection(new Vector3()).z).toBeCloseTo(-1, 5)
})

test('zooming in and out comes back, and fitting undoes moving and zooming', () => {
  const { camera, controls, box } = setUp()
  stand(camera, controls, box, STANDPOINTS.start)
  const [before, place] = [camera.zoom, camera.position.clone()]
  zoom(camera, controls, 1.25)
  expect(camera.zoom).toBeCloseTo(before * 1.25)
  zoom(camera, controls, 1 / 1.25)
  expect(camera.zoom).toBeCloseTo(before)
  controls.target.x += 30
  camera.position.x += 30
  zoom(camera, controls, 3)
  fit(camera, controls, box)
  expect(camera.zoom).toBeCloseTo(before)
  expect(camera.position.distanceTo(place)).toBeLessThan(1e-9)
})
