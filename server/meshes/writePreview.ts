import { Document, Logger, NodeIO } from '@gltf-transform/core'
import { EXTMeshoptCompression, KHRMeshQuantization } from '@gltf-transform/extensions'
import { quantize, reorder } from '@gltf-transform/functions'
import { MeshoptDecoder, MeshoptEncoder, MeshoptSimplifier } from 'meshoptimizer'
import { boxOf, diagonalOf } from '../../shared/lib/geometry/measureMesh'
import type { Mesh } from '../../shared/lib/geometry/mesh'
import { STL_FACET_BYTES } from '../../shared/lib/geometry/stl'
import { deviation } from './deviation'

/** A solid as glTF with meshopt compression, and how far it lies from the original at most. */
export interface Preview {
  glb: Uint8Array
  mesh: Mesh
  /** Greatest distance between the two surfaces over the diagonal of the original's box. */
  errorRatio: number
}

/** A preview stays this near to the original, as a share of the diagonal. */
const MOST_ERROR = 0.001
/** The simplifier's own estimate is not a bound, and quantising takes its share; so it is asked for less. */
const ASKED_ERROR = 0.0006
/** What is below this many triangles is small anyway and only loses what cannot be seen. */
const SMALL = 20_000
const SMALL_ERROR = 0.0001
/** Share of the STL's bytes that a preview may have, and what a triangle costs in it, from experience (3.4 to 3.9 bytes). */
const MOST_BYTES = 0.015
const TRIANGLE_BYTES = 3.7
/** More triangles than this show no more on a screen, and cost a phone its time. */
const MOST_TRIANGLES = 100_000
const TRIES = 4
/** Steps along an axis: 2 to this power. The coarser ones, a fortieth of a per cent of the box, only where bytes are short. */
const FINE_BITS = 14
const COARSE_BITS = 12

/**
 * Makes the preview of a welded mesh: simplified as far as the error allows, quantised, compressed. Normals are left
 * out: the viewer makes them, sharp at creases. The result is read back before its deviation is measured, so that what is
 * reported is what a reader gets. Large meshes aim at 1.5 % of the STL's bytes; where the error does not allow it, the error wins.
 */
export async function writePreview(original: Mesh): Promise<Preview> {
  await Promise.all([MeshoptEncoder.ready, MeshoptDecoder.ready, MeshoptSimplifier.ready])
  const diagonal = diagonalOf(boxOf(original)) || 1
  const triangles = original.faces.length / 3
  const budget = triangles * STL_FACET_BYTES * MOST_BYTES
  const large = triangles > SMALL
  let target = large ? Math.min(budget / TRIANGLE_BYTES, MOST_TRIANGLES) : 0
  let error = (large ? ASKED_ERROR : SMALL_ERROR) * diagonal
  let bits = FINE_BITS
  let kept: Preview | undefined
  for (let attempt = 0; attempt < TRIES; attempt++) {
    const mesh = simplify(original, target, error)
    const glb = await encode(mesh, bits)
    const decoded = await decode(glb)
    const errorRatio = deviation(original, decoded) / diagonal
    const good = errorRatio <= MOST_ERROR
    if (good && (kept === undefined || glb.length < kept.glb.length))
      kept = { glb, mesh: decoded, errorRatio }
    if (good && (!large || glb.length <= budget)) break
    if (!good && kept !== undefined) break
    if (good) {
      // Too large still: coarser steps, fewer triangles, and a part of the error that is left.
      bits = COARSE_BITS
      target *= Math.min(1, (budget / glb.length) * 1.05)
      error *= 1 + (MOST_ERROR / errorRatio - 1) * 0.4
    } else error *= (MOST_ERROR / errorRatio) * 0.7
  }
  if (kept !== undefined) return kept
  const glb = await encode(original, FINE_BITS)
  const mesh = await decode(glb)
  return { glb, mesh, errorRatio: deviation(original, mesh) / diagonal }
}

/** At most `target` triangles where `error` (in the mesh's unit) allows it. */
function simplify({ positions, faces }: Mesh, target: number, error: number): Mesh {
  const single = positions instanceof Float32Array ? positions : new Float32Array(positions)
  const most = Math.min(faces.length, Math.floor(target) * 3)
  const [indices] = MeshoptSimplifier.simplify(faces, single, 3, most, error, ['ErrorAbsolute'])
  const [remap, count] = MeshoptSimplifier.compactMesh(indices)
  const compact = new Float32Array(count * 3)
  for (let vertex = 0; vertex < remap.length; vertex++) {
    const to = remap[vertex]!
    if (to < count) compact.set(single.subarray(vertex * 3, vertex * 3 + 3), to * 3)
  }
  return { positions: compact, faces: indices }
}

function newIo(): NodeIO {
  return new NodeIO()
    .registerExtensions([EXTMeshoptCompression, KHRMeshQuantization])
    .registerDependencies({ 'meshopt.encoder': MeshoptEncoder, 'meshopt.decoder': MeshoptDecoder })
}

async function encode({ positions, faces }: Mesh, bits: number): Promise<Uint8Array> {
  const document = new Document().setLogger(new Logger(Logger.Verbosity.SILENT))
  const buffer = document.createBuffer()
  const place = document
    .createAccessor()
    .setType('VEC3')
    .setArray(new Float32Array(positions))
    .setBuffer(buffer)
  const indices = document
    .createAccessor()
    .setType('SCALAR')
    .setArray(positions.length / 3 > 65_535 ? new Uint32Array(faces) : new Uint16Array(faces))
    .setBuffer(buffer)
  const primitive = document.createPrimitive().setAttribute('POSITION', place).setIndices(indices)
  document
    .createScene()
    .addChild(document.createNode().setMesh(document.createMesh().addPrimitive(primitive)))
  await document.transform(
    reorder({ encoder: MeshoptEncoder, target: 'size' }),
    quantize({ quantizePosition: bits }),
  )
  document.createExtension(EXTMeshoptCompression).setRequired(true).setEncoderOptions({
    method: EXTMeshoptCompression.EncoderMethod.FILTER,
  })
  return newIo().writeBinary(document)
}

async function decode(glb: Uint8Array): Promise<Mesh> {
  const document = await newIo().readBinary(glb)
  const node = document.getRoot().listNodes()[0]!
  const primitive = node.getMesh()!.listPrimitives()[0]!
  const place = primitive.getAttribute('POSITION')!
  const m = node.getWorldMatrix()
  const positions = new Float32Array(place.getCount() * 3)
  const point: number[] = []
  for (let vertex = 0; vertex < place.getCount(); vertex++) {
    place.getElement(vertex, point)
    for (let axis = 0; axis < 3; axis++)
      positions[vertex * 3 + axis] =
        m[axis]! * point[0]! + m[4 + axis]! * point[1]! + m[8 + axis]! * point[2]! + m[12 + axis]!
  }
  return { positions, faces: new Uint32Array(primitive.getIndices()!.getArray()!) }
}
