import { readdirSync } from 'node:fs'
import path from 'node:path'
import { sql } from 'drizzle-orm'
import sharp from 'sharp'
import { afterEach, expect, test } from 'vitest'
import { Draft } from '../../shared/api/drafts'
import { FilesAnswer, UploadAnswer } from '../../shared/api/files'
import { GuideEntry } from '../../shared/api/guides'
import { hashOf } from '../../shared/lib/json/hash'
import { assets, jobs, revisions } from '../../server/db/schema'
import { FolderStorage } from '../../server/files/folderStorage'
import { readyDocument } from '../api/readyDocument'
import { createTestSite, type TestPerson, type TestSite } from '../api/testSite'

/** A disk that answers "full" to the nth file that is to be put in place, before or after its bytes are there. */
class FailingStorage extends FolderStorage {
  private calls = 0
  failed = false
  constructor(
    root: string,
    private readonly failAt: number,
    private readonly after: boolean,
  ) {
    super(root)
  }

  override async keepFile(temporary: string): Promise<string> {
    this.calls += 1
    const full = Object.assign(new Error('ENOSPC: no space left on device, write'), { code: 'ENOSPC' })
    if (this.calls !== this.failAt) return super.keepFile(temporary)
    this.failed = true
    if (this.after) await super.keepFile(temporary)
    throw full
  }
}

let site: TestSite | undefined
afterEach(async () => {
  await site?.close()
  site = undefined
})

const picture = async (): Promise<Uint8Array<ArrayBuffer>> =>
  new Uint8Array(
    await sharp({ create: { width: 700, height: 500, channels: 3, background: '#456' } })
      .jpeg()
      .toBuffer(),
  )

test.each([false, true])(
  'a disk that is full at any file (bytes in place: %s): nothing half counted, and it can be repeated',
  async (after) => {
    for (let failAt = 1; ; failAt += 1) {
      let storage: FailingStorage | undefined
      let now = new Date('2026-05-01T08:00:00Z')
      site = await createTestSite({
        context: (dataDir) => ({
          storage: (storage = new FailingStorage(path.join(dataDir, 'files'), failAt, after)),
          now: () => now,
        }),
      })
      const client = site.as(site.person())
      const files = [{ name: 'a.jpg', bytes: await picture() }]
      const first = await client.upload('/api/files', files)
      if (storage!.failed) {
        expect(first.problem()).toMatchObject({ status: 507, kind: 'no-space' })
        expect(site.ctx.db.select().from(assets).all()).toEqual([])
        expect(site.ctx.db.select().from(jobs).all()).toEqual([])
      } else expect(first.status).toBe(200)
      expect(readdirSync(site.ctx.storage.temporaryDir)).toEqual([])
      // Again, with room: the upload is taken, and a job that met the full disk is done when its time comes.
      const answer = first.status === 200 ? first : await client.upload('/api/files', files)
      const { files: taken } = answer.read(UploadAnswer)
      await site.drain()
      expect(readdirSync(site.ctx.storage.temporaryDir)).toEqual([])
      now = new Date(now.getTime() + 60_000)
      await site.drain()
      const [file] = (await client.get(`/api/files?sha256=${taken[0]!.sha256}`)).read(FilesAnswer).files
      expect(file).toMatchObject({ state: 'ready' })
      expect(file!.renditions.map(({ name }) => name)).toEqual(['avif-960', 'webp-480', 'webp-960'])
      const { failed } = storage!
      await site.close()
      site = undefined
      if (!failed) {
        // The original and its three renditions: each point was tried.
        expect(failAt).toBe(5)
        return
      }
    }
  },
)

interface Started {
  own: TestSite
  person: TestPerson
  id: string
}
async function start(): Promise<Started> {
  const own = await createTestSite()
  site = own
  const person = own.person()
  const { id } = (await own.as(person).post('/api/guides', { title: 'Pump', lang: 'en' })).read(GuideEntry)
  return { own, person, id }
}

/** SQLite itself says that the disk is full when the database may not grow. */
function allowPages(own: TestSite, more: number): void {
  const [{ page_count: pages }] = own.ctx.db.all<{ page_count: number }>(sql`pragma page_count`) as [
    { page_count: number },
  ]
  own.ctx.db.run(sql.raw(`pragma max_page_count = ${pages + more}`))
}

test('a database that cannot grow: a save is refused, the draft is what it was, and with room it is saved', async () => {
  const { own, person, id } = await start()
  const at = `/api/guides/${id}/draft`
  const before = (await own.as(person).get(at)).read(Draft)
  const document = {
    ...readyDocument('Pump'),
    credits: readyDocument('x').credits,
    summary: 'x'.repeat(4000),
  }
  const wide = {
    ...document,
    tools: [...Array(400).keys()].map((tool) => ({
      id: `tool${String(tool).padStart(12, '0')}`,
      name: 'y'.repeat(250),
    })),
  }
  const send = () => own.as(person).put(at, { document: wide }, { 'if-match': '"1"' })
  allowPages(own, 0)
  expect((await send()).problem()).toMatchObject({ status: 507, kind: 'no-space' })
  const after = (await own.as(person).get(at)).read(Draft)
  expect([after.version, hashOf(after.document)]).toEqual([1, hashOf(before.document)])
  own.ctx.db.run(sql.raw('pragma max_page_count = 1000000'))
  expect((await send()).status).toBe(200)
})

test('a database that fills up anywhere in publishing: the whole revision or nothing of it', async () => {
  const { own, person, id } = await start()
  const document = {
    ...readyDocument('Pump'),
    tools: [...Array(80).keys()].map((tool) => ({
      id: `tool${String(tool).padStart(12, '0')}`,
      name: `tool ${tool} ${'y'.repeat(200)}`,
    })),
  }
  await own.as(person).put(`/api/guides/${id}/draft`, { document }, { 'if-match': '"1"' })
  const publish = () =>
    own.as(person).post(`/api/guides/${id}/revisions`, { label: 'A', note: 'x' }, { 'if-match': '"2"' })
  const found = (): number => own.ctx.db.all(sql`select 1 from guide_search`).length
  let refused = 0
  for (let more = 0; ; more += 1) {
    allowPages(own, more)
    const answer = await publish()
    const published = own.ctx.db.select().from(revisions).all().length
    if (answer.status === 201) {
      expect([published, found()]).toEqual([1, 1])
      break
    }
    refused += 1
    expect(answer.problem().kind).toBe('no-space')
    expect([published, found()]).toEqual([0, 0])
    expect(
      own.ctx.db
        .select()
        .from(jobs)
        .all()
        .map(({ kind }) => kind),
    ).toEqual(['thin-draft'])
  }
  expect(refused).toBeGreaterThan(0)
})
