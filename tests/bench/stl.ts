import { STLLoader } from 'three/examples/jsm/loaders/STLLoader.js'
import { mergeVertices } from 'three/examples/jsm/utils/BufferGeometryUtils.js'
import { bumpyBall } from '../../fixtures/reference/solids'
import { writePreview } from '../../server/meshes/writePreview'
import { measureMesh } from '../../shared/lib/geometry/measureMesh'
import { readStl } from '../../shared/lib/geometry/readStl'
import { weld } from '../../shared/lib/geometry/weld'
import { writeStl } from '../../shared/lib/geometry/writeStl'

/** One figure beside its peer from the same run; `ratio` is ours over the peer's and is held against `aim`. */
export interface BenchRow {
  bench: string
  ours: number
  peer: number
  ratio: number
  aim: number
  better: 'lower' | 'higher'
}

const row = (bench: string, ours: number, peer: number, aim: number): BenchRow => ({
  bench,
  ours,
  peer,
  ratio: Number((ours / peer).toPrecision(4)),
  aim,
  better: 'lower',
})

function best(times: number, work: () => void): number {
  let least = Infinity
  for (let time = 0; time < times; time++) {
    const began = performance.now()
    work()
    least = Math.min(least, performance.now() - began)
  }
  return Number(least.toFixed(2))
}

/**
 * Reading, welding and measuring a binary STL, beside the loader of three with its merge of vertices on the same bytes (its normals
 * taken away first, because with them it would merge nothing), in milliseconds; then the preview's bytes and deviation.
 */
export async function benchStl(): Promise<BenchRow[]> {
  const rows: BenchRow[] = []
  for (const triangles of [10_000, 200_000, 1_000_000]) {
    const stl = writeStl(bumpyBall(triangles))
    const size = triangles.toLocaleString('en-GB')
    const ours = best(triangles > 100_000 ? 4 : 20, () => {
      const read = readStl(stl)
      if (!read.ok) throw new Error(read.why)
      measureMesh(weld(read.positions))
    })
    const peer = best(triangles > 500_000 ? 1 : triangles > 100_000 ? 2 : 5, () => {
      const geometry = new STLLoader().parse(stl.buffer)
      geometry.deleteAttribute('normal')
      mergeVertices(geometry)
    })
    rows.push(row(`STL read, weld and measure, ${size} triangles, ms`, ours, peer, 1 / 3))
    if (triangles < 100_000) continue
    const read = readStl(stl)
    if (!read.ok) throw new Error(read.why)
    const { glb, errorRatio } = await writePreview(weld(read.positions))
    rows.push(row(`preview bytes over STL bytes, ${size} triangles`, glb.length, stl.length, 0.015))
    rows.push(row(`preview deviation over diagonal, ${size} triangles`, errorRatio, 1, 0.001))
  }
  return rows
}
