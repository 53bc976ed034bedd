import { Box3, MathUtils, OrthographicCamera, Spherical, Vector3 } from 'three'
import type { OrbitControls } from 'three/examples/jsm/controls/OrbitControls.js'

/** From where a solid is looked at, in degrees: round about it from +x towards +y, and above the ground plane. */
export interface Standpoint {
  azimuth: number
  elevation: number
}

export const STANDPOINTS = {
  start: { azimuth: -57, elevation: 26 },
  top: { azimuth: -90, elevation: 90 },
  front: { azimuth: -90, elevation: 0 },
  side: { azimuth: 0, elevation: 0 },
} as const satisfies Record<string, Standpoint>

const BORDER = 1.12
/** Straight down, "up" has no meaning; so near to it the difference is not seen. */
const STEEPEST = 89.9

/** Puts the camera at a standpoint and shows the whole box. */
export function stand(
  camera: OrthographicCamera,
  controls: OrbitControls,
  box: Box3,
  from: Standpoint,
): void {
  const middle = box.getCenter(new Vector3())
  const away = Math.max(box.getSize(new Vector3()).length(), 1e-6)
  const azimuth = MathUtils.degToRad(from.azimuth)
  const elevation = MathUtils.degToRad(Math.min(from.elevation, STEEPEST))
  controls.target.copy(middle)
  camera.position
    .set(
      Math.cos(elevation) * Math.cos(azimuth),
      Math.cos(elevation) * Math.sin(azimuth),
      Math.sin(elevation),
    )
    .multiplyScalar(away * 2)
    .add(middle)
  camera.near = away * 0.01
  camera.far = away * 6
  fit(camera, controls, box)
}

/** Shows the whole box from where the camera stands. */
export function fit(camera: OrthographicCamera, controls: OrbitControls, box: Box3): void {
  const middle = box.getCenter(new Vector3())
  camera.position.add(middle).sub(controls.target)
  controls.target.copy(middle)
  camera.lookAt(middle)
  camera.updateMatrixWorld(true)
  const seen = new Box3()
  const corner = new Vector3()
  for (let index = 0; index < 8; index++) {
    corner.set(
      index & 1 ? box.max.x : box.min.x,
      index & 2 ? box.max.y : box.min.y,
      index & 4 ? box.max.z : box.min.z,
    )
    seen.expandByPoint(corner.applyMatrix4(camera.matrixWorldInverse))
  }
  const size = seen.getSize(corner)
  const width = camera.right - camera.left
  const height = camera.top - camera.bottom
  camera.zoom = Math.min(width / (size.x || 1e-6), height / (size.y || 1e-6)) / BORDER
  camera.updateProjectionMatrix()
  controls.update()
}

/** Turns about the middle, by degrees round and up. */
export function turn(camera: OrthographicCamera, controls: OrbitControls, round: number, up: number): void {
  const offset = camera.position.clone().sub(controls.target)
  // Spherical has y up; the models have z up.
  const sphere = new Spherical().setFromCartesianCoords(offset.y, offset.z, offset.x)
  sphere.theta += MathUtils.degToRad(round)
  sphere.phi = MathUtils.clamp(
    sphere.phi - MathUtils.degToRad(up),
    MathUtils.degToRad(90 - STEEPEST),
    MathUtils.degToRad(90 + STEEPEST),
  )
  const turned = new Vector3().setFromSpherical(sphere)
  camera.position.set(turned.z, turned.x, turned.y).add(controls.target)
  camera.lookAt(controls.target)
  controls.update()
}

/** More than 1 brings the model nearer. */
export function zoom(camera: OrthographicCamera, controls: OrbitControls, factor: number): void {
  camera.zoom = MathUtils.clamp(camera.zoom * factor, 1e-4, 1e5)
  camera.updateProjectionMatrix()
  controls.update()
}
