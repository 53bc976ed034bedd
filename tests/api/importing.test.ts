import { existsSync, readFileSync, readdirSync } from 'node:fs'
import path from 'node:path'
import { strToU8, zipSync } from 'fflate'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { Draft } from '../../shared/api/drafts'
import { ImportEntry, ImportStarted, ImportTaken } from '../../shared/api/imports'
import { GuideDocument } from '../../shared/guide/schema'
import { createTestSite, type Client, type FileToSend, type TestPerson, type TestSite } from './testSite'

/** Published designs beside the project; they are not part of it. */
const REAL = path.resolve('../shared/real')
const hasReal = existsSync(REAL)

let site: TestSite
let ada: TestPerson
beforeAll(async () => {
  site = await createTestSite()
  ada = site.person()
})
afterAll(() => site.close())

const PAGE = `# Pump

A pump that lifts water by one metre, made of pipe.

## Parts

| Part | Qty | Price (€) |
|---|---|---|
| M6 bolt | 4 | 0.20 |
| Washer | some | 0.05 |
| Total | | 1.00 |

## 1. Cut the pipe

Time: 0:10 to 0:20

Cut it with the saw. **Warning:** the edge is sharp.

![cut](img/cut.jpg)

## 2. Join

Join it with 4 M6 bolts.
`

async function bring(
  client: Client,
  files: FileToSend[],
  fields: Record<string, string> = {},
): Promise<string> {
  const answer = await client.upload('/api/imports', files, fields)
  expect(answer.status).toBe(202)
  return answer.read(ImportStarted).id
}

async function read(client: Client, id: string): Promise<ImportEntry> {
  await site.drain()
  return (await client.get(`/api/imports/${id}`)).read(ImportEntry)
}

const page = (): FileToSend[] => [{ name: 'README.md', bytes: PAGE }]
const zip = (files: Record<string, string>): Uint8Array<ArrayBuffer> =>
  new Uint8Array(
    zipSync(Object.fromEntries(Object.entries(files).map(([name, text]) => [name, strToU8(text)]))),
  )

test('a page becomes a guide: steps, parts, what is missing; once', async () => {
  const client = site.as(ada)
  const id = await bring(client, page(), { paths: JSON.stringify(['pump/README.md']) })
  const entry = await read(client, id)
  expect(entry).toMatchObject({ state: 'understood', trouble: null, understanding: { title: 'Pump' } })
  const understanding = entry.understanding!
  const steps = understanding.sections.flatMap((section) => section.steps)
  expect(steps.filter(({ include }) => include).map(({ title }) => title)).toEqual(['Cut the pipe', 'Join'])
  expect(steps.find(({ title }) => title === 'Cut the pipe')).toMatchObject({
    minutes: 20,
    figures: [{ path: 'pump/img/cut.jpg', state: 'missing', include: false }],
    cautions: [{ signal: 'warning', include: false }],
  })
  expect(understanding.tables[0]!.rows.map(({ kind }) => kind)).toEqual(['heading', 'line', 'line', 'total'])
  expect(understanding.tables[0]!.rows[2]!.problem).toContain('some')
  expect(understanding.lines.find(({ name }) => name === 'Washer')).toMatchObject({
    quantity: null,
    asNeeded: false,
  })
  expect(understanding.unused.map(({ what }) => what)).toContain('pump/img/cut.jpg')

  const { guideId } = (await client.post(`/api/imports/${id}/take`)).read(ImportTaken)
  const { document } = (await client.get(`/api/guides/${guideId}/draft`)).read(Draft)
  expect(document.title).toBe('Pump')
  expect(document.sections.flatMap((section) => section.steps).map(({ title }) => title)).toEqual([
    'Cut the pipe',
    'Join',
  ])
  expect(document.lines.map((line) => line.options[0]!.part.name)).toEqual(['M6 bolt', 'Washer'])
  const again = await client.post(`/api/imports/${id}/take`)
  expect(again.problem()).toMatchObject({ status: 400, errors: [{ path: ['state'] }] })
})

test('columns that a person corrects are read anew', async () => {
  const client = site.as(ada)
  const id = await bring(client, [{ name: 'bom.csv', bytes: 'Part;Qty;Spare\nBolt;4;8\nNut;4;9\n' }])
  const { understanding } = await read(client, id)
  const table = understanding!.tables[0]!
  const columns = table.columns.map((column) => ({
    ...column,
    meaning:
      column.index === 1 ? ('ignore' as const) : column.index === 2 ? ('quantity' as const) : column.meaning,
  }))
  const changed = await client.put(`/api/imports/${id}`, {
    understanding: { ...understanding!, tables: [{ ...table, columns }] },
  })
  expect(changed.read(ImportEntry).understanding!.lines.map(({ quantity }) => quantity?.value)).toEqual([
    '8',
    '9',
  ])
})

test('taking into a guide that exists adds and overwrites nothing', async () => {
  const client = site.as(ada)
  const first = await bring(client, page())
  await read(client, first)
  const { guideId } = (await client.post(`/api/imports/${first}/take`)).read(ImportTaken)
  const before = (await client.get(`/api/guides/${guideId}/draft`)).read(Draft).document
  const second = await bring(
    client,
    [{ name: 'more.md', bytes: '# More\n\n## 1. Paint\n\nPaint it.\n\n## 2. Dry\n\nDry it.\n' }],
    { guideId },
  )
  await read(client, second)
  expect((await client.post(`/api/imports/${second}/take`)).read(ImportTaken).guideId).toBe(guideId)
  const after = (await client.get(`/api/guides/${guideId}/draft`)).read(Draft).document
  expect(after.sections.slice(0, before.sections.length)).toEqual(before.sections)
  expect(after.title).toBe('Pump')
  expect(after.sections.at(-1)!.steps.map(({ title }) => title)).toEqual(['Paint', 'Dry'])
})

test('an import is its owner’s alone; a guide of others takes nothing', async () => {
  const id = await bring(site.as(ada), page())
  const other = site.as(site.person())
  for (const answer of [
    await other.get(`/api/imports/${id}`),
    await other.post(`/api/imports/${id}/take`),
    await other.delete(`/api/imports/${id}`),
  ]) {
    expect(answer.status).toBe(404)
  }
  expect((await site.as(null).upload('/api/imports', page())).status).toBe(401)
  await read(site.as(ada), id)
  const { guideId } = (await site.as(ada).post(`/api/imports/${id}/take`)).read(ImportTaken)
  expect((await other.upload('/api/imports', page(), { guideId })).status).toBe(404)
  expect((await site.as(ada).delete(`/api/imports/${id}`)).status).toBe(204)
  expect((await site.as(ada).get(`/api/imports/${id}`)).status).toBe(404)
})

test('a ZIP is unpacked; what leads out of it or lies in another ZIP is listed', async () => {
  const client = site.as(ada)
  const bytes = zip({
    'pump/README.md': PAGE,
    '../evil.md': '# Evil',
    'pump/inner.zip': 'PK',
    'pump/img/cut.jpg': 'no picture',
  })
  const { understanding } = await read(client, await bring(client, [{ name: 'pump.zip', bytes }]))
  expect(understanding!.title).toBe('Pump')
  const why = new Map(understanding!.unused.map(({ where, what, why: told }) => [what || where, told]))
  expect(why.get('../evil.md')).toContain('leads out')
  expect(why.get('pump/inner.zip')).toContain('ZIP within a ZIP')
  expect(why.get('pump/img/cut.jpg')).toBeDefined()
})

test('a damaged ZIP fails with a sentence; so does a form without a path for each file', async () => {
  const client = site.as(ada)
  const whole = zip({ 'README.md': PAGE.repeat(50) })
  for (const bytes of [whole.slice(0, whole.length / 2), strToU8('no ZIP at all')]) {
    const entry = await read(
      client,
      await bring(client, [{ name: 'pump.zip', bytes: new Uint8Array(bytes) }]),
    )
    expect(entry.state).toBe('failed')
    expect(entry.trouble).toMatch(/ZIP.*bring that\.$/)
  }
  expect((await client.upload('/api/imports', page(), { paths: '["a","b"]' })).status).toBe(400)
  expect((await client.upload('/api/imports', page(), { paths: '["../a.md"]' })).status).toBe(400)
})

/** At least so many steps, lines and models must come out: floors against loss, not exact counts. */
const DESIGNS: Record<string, { steps: number; lines: number; models: number }> = {
  'omni-base': { steps: 9, lines: 46, models: 8 },
  'cart-robot': { steps: 8, lines: 15, models: 1 },
  'tank-level': { steps: 6, lines: 33, models: 6 },
  'water-sampler': { steps: 7, lines: 11, models: 5 },
  'wooden-bellows': { steps: 7, lines: 18, models: 0 },
  'actuator-module': { steps: 8, lines: 20, models: 16 },
  'pump-and-microscope': { steps: 0, lines: 15, models: 7 },
  'intake-filter': { steps: 4, lines: 5, models: 0 },
}

beforeAll(() => {
  // What is made of pictures and models has tests of its own, and takes minutes for these.
  for (const kind of ['picture', 'model']) site.ctx.jobs.handle(kind, () => Promise.resolve())
})

test.skipIf(!hasReal).each(Object.entries(DESIGNS))(
  'the published design %s becomes a document',
  async (design, least) => {
    const client = site.as(ada)
    const files = readdirSync(path.join(REAL, design), { recursive: true, withFileTypes: true })
      .filter((entry) => entry.isFile() && entry.name !== 'ORIGIN.md')
      .map((entry) => path.join(entry.parentPath, entry.name))
    const packed = zipSync(
      Object.fromEntries(
        files.map((file) => [path.relative(REAL, file), new Uint8Array(readFileSync(file))]),
      ),
      { level: 1 },
    )
    const id = await bring(client, [{ name: `${design}.zip`, bytes: new Uint8Array(packed) }])
    const entry = await read(client, id)
    expect(entry.trouble).toBeNull()
    const { guideId } = (await client.post(`/api/imports/${id}/take`)).read(ImportTaken)
    const { document } = (await client.get(`/api/guides/${guideId}/draft`)).read(Draft)
    expect(GuideDocument.safeParse(document).success).toBe(true)
    const steps = document.sections.flatMap((section) => section.steps)
    expect(
      {
        steps: steps.length >= least.steps,
        lines: document.lines.length >= least.lines,
        models: document.models.length >= least.models,
      },
      `${steps.length} steps, ${document.lines.length} lines, ${document.models.length} models`,
    ).toEqual({ steps: true, lines: true, models: true })
  },
  240_000,
)
