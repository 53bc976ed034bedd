import { GLTFLoader } from 'three/examples/jsm/loaders/GLTFLoader.js'
import { BufferAttribute, BufferGeometry, Mesh as ThreeMesh, Vector3, type Object3D } from 'three'
import { MeshoptDecoder } from 'meshoptimizer/decoder'
import { creaseNormals } from '../../shared/lib/geometry/creaseNormals'
import { featureEdges } from '../../shared/lib/geometry/featureEdges'
import type { Mesh } from '../../shared/lib/geometry/mesh'

const CREASE_DEGREES = 32

/** A solid made ready for drawing: its surface, its sharp edges, and the same surface whole for its outline. */
export interface Model {
  surface: BufferGeometry
  edges: BufferGeometry
  hull: BufferGeometry
}

export type LoadOutcome = { ok: true; model: Model } | { ok: false; why: 'failed' | 'damaged' }

/**
 * Fetches a preview and prepares it. `onProgress` hears a share from 0 to 1 where the server names the length.
 * An address that does not answer is `failed`, which may be tried again; bytes that are no model are `damaged`.
 */
export async function loadModel(
  src: string,
  signal: AbortSignal,
  onProgress: (share: number) => void,
): Promise<LoadOutcome> {
  const bytes = await fetchBytes(src, signal, onProgress)
  if (bytes === undefined) return { ok: false, why: 'failed' }
  try {
    const loader = new GLTFLoader().setMeshoptDecoder(MeshoptDecoder)
    const { scene } = await loader.parseAsync(bytes, '')
    const mesh = meshOf(scene)
    return mesh === undefined ? { ok: false, why: 'damaged' } : { ok: true, model: prepare(mesh) }
  } catch (error) {
    if (!(error instanceof Error)) throw error
    return { ok: false, why: 'damaged' }
  }
}

async function fetchBytes(
  src: string,
  signal: AbortSignal,
  onProgress: (share: number) => void,
): Promise<ArrayBuffer | undefined> {
  try {
    const answer = await fetch(src, { signal })
    if (!answer.ok || answer.body === null) return undefined
    const total = Number(answer.headers.get('content-length') ?? 0)
    const chunks: BlobPart[] = []
    let received = 0
    const reader = answer.body.getReader()
    for (let chunk = await reader.read(); !chunk.done; chunk = await reader.read()) {
      chunks.push(chunk.value)
      received += chunk.value.length
      // A packed answer names its packed length: more may come than was said.
      if (total > 0) onProgress(Math.min(1, received / total))
    }
    return await new Blob(chunks).arrayBuffer()
  } catch (error) {
    // No network, or the view was closed meanwhile; either way there is nothing to show.
    if (error instanceof TypeError || signal.aborted) return undefined
    throw error
  }
}

/** The first mesh of the scene with its places in plain numbers: previews come quantised, with a matrix that undoes it. */
function meshOf(scene: Object3D): Mesh | undefined {
  let found: ThreeMesh | undefined
  scene.updateMatrixWorld(true)
  scene.traverse((object) => {
    if (object instanceof ThreeMesh) found ??= object
  })
  const geometry = found?.geometry as BufferGeometry | undefined
  const place = geometry?.getAttribute('position')
  if (found === undefined || place === undefined || !geometry?.index) return undefined
  const positions = new Float32Array(place.count * 3)
  const point = new Vector3()
  for (let vertex = 0; vertex < place.count; vertex++) {
    point.fromBufferAttribute(place, vertex).applyMatrix4(found.matrixWorld)
    positions.set([point.x, point.y, point.z], vertex * 3)
  }
  return { positions, faces: Uint32Array.from(geometry.index.array) }
}

function prepare(mesh: Mesh): Model {
  const { positions, faces } = mesh
  const corners = new Float32Array(faces.length * 3)
  faces.forEach((vertex, corner) => corners.set(positions.subarray(vertex * 3, vertex * 3 + 3), corner * 3))
  const surface = new BufferGeometry()
  surface.setAttribute('position', new BufferAttribute(corners, 3))
  surface.setAttribute('normal', new BufferAttribute(creaseNormals(mesh, CREASE_DEGREES), 3))
  const hull = new BufferGeometry()
  hull.setAttribute('position', new BufferAttribute(Float32Array.from(positions), 3))
  hull.setIndex(new BufferAttribute(faces, 1))
  hull.computeVertexNormals()
  const edges = new BufferGeometry()
  edges.setAttribute('position', hull.getAttribute('position'))
  edges.setIndex(new BufferAttribute(featureEdges(mesh, CREASE_DEGREES), 1))
  surface.computeBoundingBox()
  return { surface, edges, hull }
}

/** Gives the graphics memory back. */
export function disposeModel({ surface, edges, hull }: Model): void {
  surface.dispose()
  edges.dispose()
  hull.dispose()
}
