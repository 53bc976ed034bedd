import { mkdtemp, readdir, readFile, rm, writeFile } from 'node:fs/promises'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { afterEach, beforeEach, describe, expect, test } from 'vitest'
import { box, bumpyBall } from '../../fixtures/reference/solids'
import { writeStl } from '../../shared/lib/geometry/writeStl'
import { analyseModel } from './analyseModel'
import type { AnalyseOutcome } from './types'

let folder: string
beforeEach(async () => {
  folder = await mkdtemp(path.join(tmpdir(), 'quern-model-'))
})
afterEach(() => rm(folder, { recursive: true }))

async function analyse(bytes: Uint8Array, mostFacets?: number): Promise<AnalyseOutcome> {
  const file = path.join(folder, 'part.stl')
  await writeFile(file, bytes)
  return analyseModel({ file, outDir: folder, mostFacets })
}

describe('a sound file', () => {
  test('is measured, and its preview and stills are written', async () => {
    const outcome = await analyse(writeStl(box(10, 20, 30)))
    if (!outcome.ok) throw new Error(outcome.sentence)
    expect(outcome.facts).toMatchObject({
      triangles: 12,
      volume: 6000,
      area: 2200,
      box: { x: 10, y: 20, z: 30 },
      closed: true,
      shells: 1,
      openEdges: 0,
    })
    expect(outcome.made.map(({ name, mediaType }) => [name, mediaType])).toEqual([
      ['glb', 'model/gltf-binary'],
      ['still', 'image/svg+xml'],
      ['still-png', 'image/png'],
    ])
    for (const { file, bytes } of outcome.made) expect((await readFile(file)).length).toBe(bytes)
    expect((await readFile(outcome.made[0]!.file)).subarray(0, 4).toString()).toBe('glTF')
  })

  test('gives the same bytes when the job runs twice', async () => {
    const bytes = writeStl(bumpyBall(4000))
    const contents = async (): Promise<string[]> => {
      const outcome = await analyse(bytes)
      if (!outcome.ok) throw new Error(outcome.sentence)
      return Promise.all(outcome.made.map(async ({ file }) => (await readFile(file)).toString('base64')))
    }
    expect(await contents()).toEqual(await contents())
  })

  // The bars of the project: a preview of at most 1.5 % of the bytes at 0.1 % of the diagonal.
  test('of 120,000 triangles keeps within 1.5 % of the bytes and 0.1 % of the diagonal', async () => {
    const bytes = writeStl(bumpyBall(120_000))
    const outcome = await analyse(bytes)
    if (!outcome.ok) throw new Error(outcome.sentence)
    expect(outcome.made[0]!.bytes / bytes.length).toBeLessThanOrEqual(0.015)
    expect(outcome.facts.previewErrorRatio).toBeLessThanOrEqual(0.001)
    expect(outcome.facts.previewErrorRatio).toBeGreaterThan(0)
    expect(outcome.made[1]!.bytes).toBeLessThanOrEqual(40_000)
  })
})

describe('a file that is not taken', () => {
  test.each([
    [
      'truncated',
      writeStl(box(1, 1, 1)).subarray(0, 400),
      'This STL promises 12 facets and holds 6. Bring the whole file again.',
    ],
    ['not-stl', new Uint8Array(500).fill(65), 'This is not an STL file'],
    ['no-facets', new Uint8Array(84), 'holds no facets'],
  ])('%s: says why and leaves nothing behind', async (why, bytes, sentence) => {
    const outcome = await analyse(bytes)
    expect(outcome).toMatchObject({ ok: false, why, sentence: expect.stringContaining(sentence) })
    expect(await readdir(folder)).toEqual(['part.stl'])
  })

  test('too large: names both numbers', async () => {
    const outcome = await analyse(writeStl(bumpyBall(4000)), 1000)
    expect(outcome).toMatchObject({
      ok: false,
      why: 'too-many',
      sentence: expect.stringContaining('at most 1,000'),
    })
  })
})
