import { sql } from 'drizzle-orm'
import { afterAll, beforeAll, expect, test } from 'vitest'
import { Draft, SavedDraft } from '../../shared/api/drafts'
import { GuideEntry, GuidePage } from '../../shared/api/guides'
import { RevisionEntry, RevisionPage } from '../../shared/api/revisions'
import type { GuideDocument } from '../../shared/guide/schema'
import { hashOf } from '../../shared/lib/json/hash'
import { documents, jobs, revisions } from '../../server/db/schema'
import { readyDocument } from './readyDocument'
import { createTestSite, type Answer, type TestPerson, type TestSite } from './testSite'

let site: TestSite
beforeAll(async () => {
  site = await createTestSite()
})
afterAll(() => site.close())

interface Started {
  owner: TestPerson
  id: string
  document: GuideDocument
}

async function start(
  title: string,
  change: (document: GuideDocument) => GuideDocument = (document) => document,
): Promise<Started> {
  const owner = site.person('member', { name: 'Olga Owner' })
  const { id } = (
    await site.as(owner).post('/api/guides', { title: 'Started as something else', lang: 'en' })
  ).read(GuideEntry)
  const document = change(readyDocument(title))
  await save(owner, id, document, 1)
  return { owner, id, document }
}

const save = async (
  person: TestPerson,
  id: string,
  document: GuideDocument,
  version: number,
): Promise<SavedDraft> =>
  (await site.as(person).put(`/api/guides/${id}/draft`, { document }, { 'if-match': `"${version}"` })).read(
    SavedDraft,
  )

const publish = (person: TestPerson, id: string, version: number, ask: object): Promise<Answer> =>
  site
    .as(person)
    .post(`/api/guides/${id}/revisions`, { note: 'The first.', ...ask }, { 'if-match': `"${version}"` })

const found = (words: string): string[] =>
  site.ctx.db
    .all<{ guide_id: string }>(sql`select guide_id from guide_search where guide_search match ${words}`)
    .map((row) => row.guide_id)

test('the draft becomes revision A: with its address, found by its words, listed', async () => {
  const { owner, id, document } = await start('Rope pump for wells')
  expect(found('rubber')).not.toContain(id)
  const answer = await publish(owner, id, 2, { label: 'A', changeClass: 'wording' })
  expect(answer.status).toBe(201)
  const revision = answer.read(RevisionEntry)
  expect(revision).toMatchObject({
    number: 1,
    label: 'A',
    note: 'The first.',
    changeClass: null,
    documentHash: hashOf(document),
    publishedByName: 'Olga Owner',
    address: '/guides/rope-pump-for-wells/revisions/A',
  })
  expect(found('rubber')).toContain(id)
  expect(found('"Pressure pipe"')).toContain(id)
  const list = (await site.as(owner).get(`/api/guides/${id}/revisions`)).read(RevisionPage)
  expect(list).toEqual({ revisions: [revision], next: null })
  const [guide] = (await site.as(owner).get('/api/guides')).read(GuidePage).guides
  expect(guide).toMatchObject({ slug: 'rope-pump-for-wells', latest: { label: 'A' } })
  const queued = site.ctx.db
    .select()
    .from(jobs)
    .all()
    .filter((job) => job.kind === 'revision-published')
  expect(queued.map((job) => job.payload)).toContain(JSON.stringify({ revisionId: revision.id }))
  await site.drain()
  expect(
    site.ctx.db
      .select()
      .from(jobs)
      .all()
      .filter((job) => job.state === 'failed'),
  ).toEqual([])
})

test('the next one needs a class of change; the search has the latest alone; the address stays', async () => {
  const { owner, id, document } = await start('Treadle grinder')
  const first = (await publish(owner, id, 2, { label: 'A' })).read(RevisionEntry)
  await save(owner, id, { ...document, title: 'Treadle mill', summary: 'Grinds millet.' }, 2)
  expect((await publish(owner, id, 3, { label: 'B' })).problem()).toMatchObject({
    kind: 'bad-request',
    errors: [{ path: ['changeClass'] }],
  })
  const next = (await publish(owner, id, 3, { label: 'B', changeClass: 'interchangeable' })).read(
    RevisionEntry,
  )
  expect(next).toMatchObject({
    number: 2,
    changeClass: 'interchangeable',
    address: '/guides/treadle-grinder/revisions/B',
  })
  expect(found('millet')).toContain(id)
  expect(found('washers')).not.toContain(id)
  const list = (await site.as(owner).get(`/api/guides/${id}/revisions`)).read(RevisionPage)
  expect(list.revisions).toEqual([next, first])
  const kept = site.ctx.db
    .select()
    .from(documents)
    .all()
    .find((row) => row.hash === first.documentHash)
  expect(JSON.parse(kept!.json)).toEqual(document)
})

test('two guides of one title have two addresses, and a script keeps its letters', async () => {
  const first = await start('مضخة')
  const second = await start('مضخة')
  const addresses: string[] = []
  for (const { owner, id } of [first, second]) {
    addresses.push(
      decodeURIComponent((await publish(owner, id, 2, { label: 'أ' })).read(RevisionEntry).address),
    )
  }
  expect(addresses).toEqual(['/guides/مضخة/revisions/أ', '/guides/مضخة-2/revisions/أ'])
})

test('a draft that must be mended is not published, and how many points are open is said', async () => {
  const { owner, id } = await start('Not yet', (document) => ({ ...document, licence: '' }))
  const problem = (await publish(owner, id, 2, { label: 'A' })).problem()
  expect(problem).toMatchObject({ status: 409, kind: 'not-ready', values: { count: 1 } })
  expect(
    site.ctx.db
      .select()
      .from(revisions)
      .all()
      .filter((row) => row.guideId === id),
  ).toEqual([])
})

test('an older version, a taken label, and nothing new', async () => {
  const { owner, id, document } = await start('Solar dryer')
  expect((await publish(owner, id, 1, { label: 'A' })).problem().kind).toBe('stale')
  expect((await publish(owner, id, 2, { label: 'A' })).status).toBe(201)
  expect((await publish(owner, id, 2, { label: 'B', changeClass: 'wording' })).problem()).toMatchObject({
    kind: 'nothing-changed',
    values: { label: 'A' },
  })
  await save(owner, id, { ...document, summary: 'Dries apples.' }, 2)
  expect((await publish(owner, id, 3, { label: 'a', changeClass: 'wording' })).problem()).toMatchObject({
    kind: 'label-taken',
    values: { label: 'A' },
  })
})

test('what is wrong in the form is named', async () => {
  const { owner, id } = await start('Rocket stove')
  const problem = (await publish(owner, id, 2, { label: 'A/B', note: ' ' })).problem()
  expect(problem.errors?.map((error) => error.path)).toEqual([['label'], ['note']])
  expect(
    (await site.as(owner).post(`/api/guides/${id}/revisions`, { label: 'A', note: 'x' })).problem().kind,
  ).toBe('etag-missing')
})

test('places that two authors changed are settled first', async () => {
  const { owner, id, document } = await start('Press')
  await save(owner, id, { ...document, title: 'Oil press' }, 2)
  const late = await save(owner, id, { ...document, title: 'Fruit press' }, 2)
  expect((await publish(owner, id, 3, { label: 'A' })).problem()).toMatchObject({
    kind: 'conflicts-open',
    values: { count: 1 },
  })
  await site.as(owner).post(`/api/guides/${id}/draft/conflicts/${late.conflicts[0]!.id}`, { keep: 'theirs' })
  expect((await publish(owner, id, 3, { label: 'A' })).status).toBe(201)
})

test('two at once: one is published, the other hears of it', async () => {
  const { owner, id } = await start('Wind pump')
  const answers = await Promise.all(['A', 'A', 'B'].map((label) => publish(owner, id, 2, { label })))
  expect(answers.map((answer) => answer.status).sort()).toEqual([201, 409, 409])
  expect(
    site.ctx.db
      .select()
      .from(revisions)
      .all()
      .filter((row) => row.guideId === id),
  ).toHaveLength(1)
})

test('a published guide is not removed', async () => {
  const { owner, id } = await start('Lathe')
  await publish(owner, id, 2, { label: 'A' })
  expect((await site.as(owner).delete(`/api/guides/${id}`)).problem()).toMatchObject({
    status: 409,
    kind: 'is-published',
  })
  expect((await site.as(owner).get(`/api/guides/${id}/draft`)).read(Draft).guide.latest?.label).toBe('A')
})

test('all or nothing: when the last write fails, none of the others has happened', async () => {
  const own = await createTestSite()
  const before = site
  try {
    site = own
    const { owner, id } = await start('Loom')
    own.ctx.db.run(sql`drop table guide_search`)
    expect((await publish(owner, id, 2, { label: 'A' })).problem().kind).toBe('internal')
    expect(own.ctx.db.select().from(revisions).all()).toEqual([])
    const { guide } = (await own.as(owner).get(`/api/guides/${id}/draft`)).read(Draft)
    expect(guide).toMatchObject({ slug: 'started-as-something-else', latest: null })
    expect(
      own.ctx.db
        .select()
        .from(jobs)
        .all()
        .map(({ kind }) => kind),
    ).toEqual(['thin-draft'])
  } finally {
    site = before
    await own.close()
  }
})
