import { readFile, writeFile } from 'node:fs/promises'
import path from 'node:path'
import type { ModelFacts } from '../../shared/api/files'
import { measureMesh, type MeshMeasures } from '../../shared/lib/geometry/measureMesh'
import type { Mesh } from '../../shared/lib/geometry/mesh'
import { readStl } from '../../shared/lib/geometry/readStl'
import type { StlRefusal } from '../../shared/lib/geometry/stl'
import { weld } from '../../shared/lib/geometry/weld'
import { drawStill } from './drawStill'
import { pngOf } from './drawing/pngOf'
import { sayRefusal } from './sayRefusal'
import type { AnalyseOutcome, AnalyseRequest, MadeFile } from './types'
import { writePreview } from './writePreview'

const MOST_FACETS = 5_000_000
const DRAWN_AS_IT_IS = 150_000
const PICTURE = { width: 1200, height: 630 }

/**
 * Measures a stored STL and makes its preview and stills. Runs in a worker thread: it computes for 0.2 s (10,000 triangles) to
 * 5 s (1,000,000) without a pause. Everything is made before the first file is written; writing twice gives the same bytes.
 * @throws for trouble with the disk, which is not the file's fault and may be tried again.
 */
export async function analyseModel(request: AnalyseRequest): Promise<AnalyseOutcome> {
  const read = await readMesh(request.file, request.mostFacets ?? MOST_FACETS)
  if (!read.ok) return { ok: false, why: read.why, sentence: sayRefusal(read) }
  const measures = measureMesh(read.mesh)
  const preview = await writePreview(read.mesh)
  // A large mesh is drawn from its preview, which lies within a pixel of it; a small one from itself, whose facets lie more evenly.
  const { drawing, svg } = drawStill(measures.triangles > DRAWN_AS_IT_IS ? preview.mesh : read.mesh)
  const png = await pngOf(drawing, PICTURE.width, PICTURE.height)
  const put = async (
    name: MadeFile['name'],
    fileName: string,
    mediaType: MadeFile['mediaType'],
    data: Uint8Array | string,
    size: { width: number; height: number } | undefined,
  ): Promise<MadeFile> => {
    const file = path.join(request.outDir, fileName)
    await writeFile(file, data)
    const bytes = typeof data === 'string' ? Buffer.byteLength(data) : data.length
    return { name, file, mediaType, bytes, width: size?.width ?? null, height: size?.height ?? null }
  }
  const made = [
    await put('glb', 'preview.glb', 'model/gltf-binary', preview.glb, undefined),
    await put('still', 'still.svg', 'image/svg+xml', svg, drawing),
    await put('still-png', 'still.png', 'image/png', png, PICTURE),
  ]
  return { ok: true, facts: factsOf(measures, preview.errorRatio), made }
}

/** Apart, so that the bytes of the file and its unshared corners are free again before the preview needs the room. */
async function readMesh(file: string, mostFacets: number): Promise<{ ok: true; mesh: Mesh } | StlRefusal> {
  const stl = readStl(await readFile(file), { mostFacets })
  return stl.ok ? { ok: true, mesh: weld(stl.positions) } : stl
}

function factsOf(measures: MeshMeasures, previewErrorRatio: number): ModelFacts {
  const { min, max } = measures.box
  return {
    triangles: measures.triangles,
    volume: measures.volume,
    area: measures.area,
    box: { x: max[0] - min[0], y: max[1] - min[1], z: max[2] - min[2] },
    closed: measures.closed,
    shells: measures.shells,
    openEdges: measures.openEdges,
    backwardsEdges: measures.backwardsEdges,
    nonManifoldEdges: measures.nonManifoldEdges,
    degenerateFacets: measures.degenerateFacets,
    previewErrorRatio,
  }
}
