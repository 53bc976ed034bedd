import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { Draft, HereAnswer, SavedDraft } from '../../shared/api/drafts'
import { GuideEntry, GuidePage } from '../../shared/api/guides'
import { insertNode, setNode } from '../../shared/guide/edit'
import { emptyStep } from '../../shared/guide/emptyDocument'
import type { GuideDocument, Line } from '../../shared/guide/schema'
import { hashOf } from '../../shared/lib/json/hash'
import { newId } from '../../server/context'
import { documents, draftStates } from '../../server/db/schema'
import { createTestSite, type Answer, type TestPerson, type TestSite } from './testSite'

let site: TestSite
let now = new Date('2026-05-01T08:00:00Z')
beforeAll(async () => {
  site = await createTestSite({ context: { now: () => now } })
})
afterAll(() => site.close())

interface Started {
  owner: TestPerson
  author: TestPerson
  id: string
  first: GuideDocument
}

async function start(title = 'Rope pump'): Promise<Started> {
  const owner = site.person('member', { name: 'Olga Owner' })
  const author = site.person('member', { name: 'Aziz Author' })
  const guide = (await site.as(owner).post('/api/guides', { title, lang: 'en', machine: 'pump' })).read(
    GuideEntry,
  )
  site.give(author, guide.id, 'author')
  return { owner, author, id: guide.id, first: (await look(owner, guide.id)).document }
}

const look = async (person: TestPerson, id: string): Promise<Draft> =>
  (await site.as(person).get(`/api/guides/${id}/draft`)).read(Draft)

const send = (person: TestPerson, id: string, document: unknown, version: number): Promise<Answer> =>
  site.as(person).put(`/api/guides/${id}/draft`, { document }, { 'if-match': `"${version}"` })

const save = async (
  person: TestPerson,
  id: string,
  document: GuideDocument,
  version: number,
): Promise<SavedDraft> => (await send(person, id, document, version)).read(SavedDraft)

const title = (document: GuideDocument, text: string): GuideDocument => ({ ...document, title: text })
const stepTitle = (document: GuideDocument, text: string, at = 0): GuideDocument =>
  setNode(document, 'step', document.sections[0]!.steps[at]!.id, { title: text })

function withLine(document: GuideDocument, names: string[]): GuideDocument {
  const line: Line = {
    id: newId(),
    kind: 'bought',
    quantity: { value: '1', unit: 'each' },
    note: '',
    options: names.map((name) => ({
      id: newId(),
      part: { key: '', name, specification: '' },
      regions: [],
      requires: [],
      excludes: [],
      sources: [],
    })),
  }
  return insertNode(document, 'line', line, null)
}

describe('reading', () => {
  test('a new draft is version 1, with the person as its owner', async () => {
    const { owner, id } = await start('A new one')
    const answer = await site.as(owner).get(`/api/guides/${id}/draft`)
    expect(answer.etag).toBe('"1"')
    expect(answer.headers.get('cache-control')).toBe('no-store')
    const draft = answer.read(Draft)
    expect(draft).toMatchObject({
      version: 1,
      conflicts: [],
      files: [],
      guide: { slug: 'a-new-one', byline: 'Olga Owner', roles: ['owner'], version: 1, latest: null },
      document: { title: 'A new one', lang: 'en', machine: 'pump' },
    })
  })

  test('If-None-Match of the version that is there answers 304, of an older one the draft', async () => {
    const { owner, id, first } = await start()
    const at = `/api/guides/${id}/draft`
    expect((await site.as(owner).get(at, { 'if-none-match': '"1"' })).status).toBe(304)
    await save(owner, id, title(first, 'Other'), 1)
    expect((await site.as(owner).get(at, { 'if-none-match': '"1"' })).status).toBe(200)
  })
})

describe('saving', () => {
  test('the next version holds what was sent', async () => {
    const { owner, id, first } = await start()
    const changed = stepTitle(title(first, 'Rope and washer pump'), 'Cut the pipe')
    const answer = await send(owner, id, changed, 1)
    expect(answer.etag).toBe('"2"')
    expect(answer.read(SavedDraft)).toMatchObject({ version: 2, merged: false, conflicts: [] })
    const draft = await look(owner, id)
    expect(hashOf(draft.document)).toBe(hashOf(changed))
    expect(draft.guide).toMatchObject({
      title: 'Rope and washer pump',
      version: 2,
      updatedByName: 'Olga Owner',
    })
  })

  test('a save that changes nothing makes no new version, and one content is stored once', async () => {
    const { owner, id, first } = await start()
    const other = title(first, 'Other')
    expect((await save(owner, id, first, 1)).version).toBe(1)
    expect((await save(owner, id, other, 1)).version).toBe(2)
    expect((await save(owner, id, other, 2)).version).toBe(2)
    expect((await save(owner, id, first, 2)).version).toBe(3)
    const states = site.ctx.db
      .select()
      .from(draftStates)
      .all()
      .filter((state) => state.guideId === id)
    expect(states.map((state) => state.documentHash)).toEqual([hashOf(first), hashOf(other), hashOf(first)])
    const stored = site.ctx.db.select().from(documents).all()
    expect(stored.filter((document) => document.hash === hashOf(first))).toHaveLength(1)
  })

  test('without If-Match, with one that is none, and with one from the future: a refusal each', async () => {
    const { owner, id, first } = await start()
    const at = `/api/guides/${id}/draft`
    expect((await site.as(owner).put(at, { document: first })).problem()).toMatchObject({
      status: 428,
      kind: 'etag-missing',
    })
    expect((await site.as(owner).put(at, { document: first }, { 'if-match': '*' })).problem()).toMatchObject({
      kind: 'bad-request',
      errors: [{ path: ['If-Match'] }],
    })
    expect((await send(owner, id, first, 7)).problem()).toMatchObject({ status: 409, kind: 'stale' })
    expect((await look(owner, id)).version).toBe(1)
  })

  test('what is wrong is named by its path', async () => {
    const { owner, id, first } = await start()
    const wrong = structuredClone(first) as unknown as { sections: { steps: { minutes: unknown }[] }[] }
    wrong.sections[0]!.steps[0]!.minutes = 'ten'
    expect((await send(owner, id, wrong, 1)).problem()).toMatchObject({
      kind: 'bad-request',
      errors: [{ path: ['document', 'sections', 0, 'steps', 0, 'minutes'] }],
    })
  })

  test('a file that the site does not have is refused with its name', async () => {
    const { owner, id, first } = await start()
    const sha256 = 'a'.repeat(64)
    const asset = { sha256, mediaType: 'image/jpeg', bytes: 1, name: 'bench at dusk.jpg' }
    expect((await send(owner, id, { ...first, assets: [asset] }, 1)).problem()).toMatchObject({
      kind: 'bad-request',
      errors: [
        {
          path: ['document', 'assets', 0, 'sha256'],
          message: expect.stringContaining('bench at dusk.jpg') as string,
        },
      ],
    })
    expect((await look(owner, id)).version).toBe(1)
  })

  test('one id for two nodes is refused, since a merge would take one for the other', async () => {
    const { owner, id, first } = await start()
    const step = first.sections[0]!.steps[0]!
    const twice = insertNode(first, 'step', { ...emptyStep(newId), id: step.id }, first.sections[0]!.id)
    expect((await send(owner, id, twice, 1)).problem().errors?.[0]?.message).toContain(step.id)
  })

  test('a body without end and a huge one are refused, and the site goes on', async () => {
    const { owner, id, first } = await start()
    const at = `/api/guides/${id}/draft`
    const deep = `{"document":${'{"a":'.repeat(200_000)}1${'}'.repeat(200_000)}}`
    expect((await site.as(owner).put(at, deep, { 'if-match': '"1"' })).problem().kind).toBe('bad-request')
    const huge = JSON.stringify({ document: { ...first, summary: 'x'.repeat(21 * 1024 * 1024) } })
    expect((await site.as(owner).put(at, huge, { 'if-match': '"1"' })).problem()).toMatchObject({
      status: 413,
      kind: 'too-large',
    })
    expect((await look(owner, id)).version).toBe(1)
  })

  test('an address with a broken escape is a problem of the one who asks', async () => {
    const { owner } = await start()
    expect((await site.as(owner).get('/api/guides/%E0%A4%A/draft')).problem().kind).toBe('bad-request')
  })
})

describe('two authors', () => {
  test('changes of different steps combine', async () => {
    const { owner, author, id, first } = await start()
    const two = insertNode(first, 'step', emptyStep(newId, 'Second'), first.sections[0]!.id)
    await save(owner, id, two, 1)
    await save(owner, id, stepTitle(two, 'By the owner', 0), 2)
    const late = await save(author, id, stepTitle(two, 'By the author', 1), 2)
    expect(late).toMatchObject({ version: 4, merged: true, conflicts: [] })
    expect(late.document.sections[0]!.steps.map((step) => step.title)).toEqual([
      'By the owner',
      'By the author',
    ])
    expect(hashOf((await look(owner, id)).document)).toBe(hashOf(late.document))
  })

  test('one field changed by both: the first stays, the second is kept with both names, until it is settled', async () => {
    const { owner, author, id, first } = await start()
    await save(owner, id, title(first, 'From the owner'), 1)
    const late = await save(author, id, title(first, 'From the author'), 1)
    expect(late).toMatchObject({ version: 2, merged: true, document: { title: 'From the owner' } })
    expect(late.conflicts).toMatchObject([
      {
        node: null,
        field: 'title',
        why: 'both changed',
        base: 'Rope pump',
        mine: 'From the author',
        theirs: 'From the owner',
        mineByName: 'Aziz Author',
        theirsByName: 'Olga Owner',
      },
    ])
    const at = `/api/guides/${id}/draft/conflicts/${late.conflicts[0]!.id}`
    expect((await site.as(owner).post(at, { keep: 'neither' })).problem().kind).toBe('bad-request')
    expect((await site.as(owner).post(at, { keep: 'mine' })).status).toBe(204)
    expect(await look(owner, id)).toMatchObject({
      version: 3,
      conflicts: [],
      document: { title: 'From the author' },
    })
    expect((await site.as(owner).post(at, { keep: 'mine' })).problem().kind).toBe('not-found')
  })

  test('settling for theirs leaves the draft as it is', async () => {
    const { owner, author, id, first } = await start()
    await save(owner, id, title(first, 'From the owner'), 1)
    const late = await save(author, id, title(first, 'From the author'), 1)
    await site
      .as(author)
      .post(`/api/guides/${id}/draft/conflicts/${late.conflicts[0]!.id}`, { keep: 'theirs' })
    expect(await look(owner, id)).toMatchObject({
      version: 2,
      conflicts: [],
      document: { title: 'From the owner' },
    })
  })

  test('the other side is named who changed this place, not who saved last', async () => {
    const { owner, author, id, first } = await start()
    const third = site.person('member', { name: 'Thea Third' })
    site.give(third, id, 'author')
    await save(owner, id, title(first, 'From the owner'), 1)
    await save(third, id, { ...title(first, 'From the owner'), summary: 'By the third' }, 2)
    const late = await save(author, id, title(first, 'From the author'), 1)
    expect(late.conflicts).toMatchObject([{ theirsByName: 'Olga Owner' }])
  })

  test('who goes on typing in a conflict has one of it, with the newest words', async () => {
    const { owner, author, id, first } = await start()
    await save(owner, id, title(first, 'From the owner'), 1)
    await save(author, id, title(first, 'From'), 1)
    const late = await save(author, id, title(first, 'From the author'), 1)
    expect(late.conflicts.map((conflict) => conflict.mine)).toEqual(['From the author'])
  })

  test('a part of a line: its name is put back within the part', async () => {
    const { owner, author, id, first } = await start()
    const lined = withLine(first, ['Bearing'])
    await save(owner, id, lined, 1)
    const named = (name: string): GuideDocument => {
      const option = lined.lines[0]!.options[0]!
      return setNode(lined, 'option', option.id, { part: { ...option.part, name } })
    }
    await save(owner, id, named('Ball bearing'), 2)
    const late = await save(author, id, named('Deep groove bearing'), 2)
    const at = `/api/guides/${id}/draft/conflicts/${late.conflicts[0]!.id}`
    expect((await site.as(author).post(at, { keep: 'mine' })).status).toBe(204)
    const { document } = await look(author, id)
    expect(document.lines[0]!.options[0]!.part.name).toBe('Deep groove bearing')
  })

  test('changed here and removed there: it stays until somebody settles it', async () => {
    const { owner, author, id, first } = await start()
    const two = insertNode(first, 'step', emptyStep(newId, 'Second'), first.sections[0]!.id)
    await save(owner, id, two, 1)
    const removed = {
      ...two,
      sections: two.sections.map((one) => ({ ...one, steps: one.steps.slice(0, 1) })),
    }
    await save(owner, id, removed, 2)
    const late = await save(author, id, stepTitle(two, 'Second, mended', 1), 2)
    expect(late.conflicts).toMatchObject([{ why: 'changed and removed' }])
    expect(late.document.sections[0]!.steps[1]!.title).toBe('Second, mended')
    await site
      .as(owner)
      .post(`/api/guides/${id}/draft/conflicts/${late.conflicts[0]!.id}`, { keep: 'theirs' })
    expect((await look(owner, id)).document.sections[0]!.steps).toHaveLength(1)
  })

  test('each takes out another of two options: the line keeps one, and the other choice is kept beside it', async () => {
    const { owner, author, id, first } = await start()
    const lined = withLine(first, ['Rope', 'Cord'])
    await save(owner, id, lined, 1)
    const only = (at: number): GuideDocument => ({
      ...lined,
      lines: lined.lines.map((line) => ({ ...line, options: [line.options[at]!] })),
    })
    await save(owner, id, only(0), 2)
    const late = await save(author, id, only(1), 2)
    const at = `/api/guides/${id}/draft/conflicts/${late.conflicts[0]!.id}`
    expect((await site.as(author).post(at, { keep: 'mine' })).status).toBe(204)
    const { options } = (await look(author, id)).document.lines[0]!
    expect(options.map((option) => option.part.name)).toEqual(['Cord'])
  })

  test('two changes that make nothing valid together: the draft stays, the late document is kept whole', async () => {
    const { owner, author, id, first } = await start()
    const lined = withLine(first, ['Rope'])
    await save(owner, id, lined, 1)
    const more = (names: string): GuideDocument => {
      const added = withLine(lined, Array<string>(20).fill(names)).lines[1]!.options
      return { ...lined, lines: [{ ...lined.lines[0]!, options: [...lined.lines[0]!.options, ...added] }] }
    }
    await save(owner, id, more('Cord'), 2)
    const late = await save(author, id, more('Chain'), 2)
    expect(late).toMatchObject({ version: 3, conflicts: [{ node: null, field: '', why: 'both changed' }] })
    const at = `/api/guides/${id}/draft/conflicts/${late.conflicts[0]!.id}`
    expect((await site.as(author).post(at, { keep: 'mine' })).status).toBe(204)
    expect((await look(author, id)).document.lines[0]!.options[1]!.part.name).toBe('Chain')
  })

  test('ten at once from one version: each comes after the other, nothing is lost', async () => {
    const { owner, author, id, first } = await start()
    let many = first
    for (let step = 1; step < 10; step += 1) {
      many = insertNode(many, 'step', emptyStep(newId, `Step ${step}`), first.sections[0]!.id)
    }
    await save(owner, id, many, 1)
    const answers = await Promise.all(
      [...Array(10).keys()].map((step) =>
        save(step % 2 === 0 ? owner : author, id, stepTitle(many, `Mended ${step}`, step), 2),
      ),
    )
    expect(answers.map((answer) => answer.version).sort((a, b) => a - b)).toEqual([
      3, 4, 5, 6, 7, 8, 9, 10, 11, 12,
    ])
    const { document, conflicts } = await look(owner, id)
    expect(conflicts).toEqual([])
    expect(document.sections[0]!.steps.map((step) => step.title)).toEqual(
      [...Array(10).keys()].map((step) => `Mended ${step}`),
    )
  })

  test('who is here within the last minute, and at which step', async () => {
    const { owner, author, id } = await start()
    const at = `/api/guides/${id}/draft/here`
    const say = async (person: TestPerson, step: string | null): Promise<HereAnswer> =>
      (await site.as(person).post(at, { step })).read(HereAnswer)
    expect(await say(owner, 'a')).toEqual({ version: 1, also: [] })
    expect(await say(author, null)).toEqual({ version: 1, also: [{ name: 'Olga Owner', step: 'a' }] })
    now = new Date(now.getTime() + 59_000)
    expect((await say(owner, 'b')).also).toEqual([{ name: 'Aziz Author', step: null }])
    now = new Date(now.getTime() + 2_000)
    expect((await say(owner, 'b')).also).toEqual([])
  })
})

test('after a day one state an hour is kept, and a save from one that is gone is merged from the one before it', async () => {
  const { owner, author, id, first } = await start()
  const versions = (): number[] =>
    site.ctx.db
      .select()
      .from(draftStates)
      .all()
      .filter((state) => state.guideId === id)
      .map((state) => state.version)
  const hour = 3600_000
  now = new Date(Math.ceil(now.getTime() / hour) * hour)
  for (let version = 1; version <= 6; version += 1) {
    await save(owner, id, stepTitle(first, `Written ${version}`), version)
    now = new Date(now.getTime() + 20 * 60_000)
  }
  const gone = hashOf(stepTitle(first, 'Written 1'))
  await site.drain()
  expect(versions()).toEqual([1, 2, 3, 4, 5, 6, 7])
  now = new Date(now.getTime() + 25 * hour)
  await site.drain()
  expect(versions()).toEqual([1, 4, 7])
  expect(
    site.ctx.db
      .select()
      .from(documents)
      .all()
      .some((row) => row.hash === gone),
  ).toBe(false)
  const late = await save(author, id, { ...stepTitle(first, 'Written 5'), summary: 'By the author' }, 6)
  expect(late.document).toMatchObject({ summary: 'By the author' })
  expect(late.conflicts).toMatchObject([{ field: 'title', mine: 'Written 5', theirs: 'Written 6' }])
})

describe('guides', () => {
  test('slugs are unique and keep the script', async () => {
    const owner = site.person()
    const slugs: string[] = []
    for (const name of ['مضخة الحبل', 'مضخة الحبل', '…', '…']) {
      slugs.push(
        (await site.as(owner).post('/api/guides', { title: name, lang: 'ar' })).read(GuideEntry).slug,
      )
    }
    expect(slugs).toEqual(['مضخة-الحبل', 'مضخة-الحبل-2', 'untitled', 'untitled-2'])
  })

  test('a title is asked for', async () => {
    const owner = site.person()
    expect((await site.as(owner).post('/api/guides', { title: '  ', lang: 'en' })).problem()).toMatchObject({
      errors: [{ path: ['title'], message: 'Give the guide a title.' }],
    })
  })

  test('the list has one’s own, the last changed first, page by page, each once', async () => {
    const owner = site.person()
    const ids: string[] = []
    for (let count = 0; count < 65; count += 1) {
      if (count % 3 === 0) now = new Date(now.getTime() + 1000)
      const made = await site.as(owner).post('/api/guides', { title: `Guide ${count}`, lang: 'en' })
      ids.push(made.read(GuideEntry).id)
    }
    const seen: string[] = []
    let next: string | null = null
    let pages = 0
    do {
      const query: string = next === null ? '' : `?cursor=${encodeURIComponent(next)}`
      const page: GuidePage = (await site.as(owner).get(`/api/guides${query}`)).read(GuidePage)
      seen.push(...page.guides.map((guide) => guide.id))
      next = page.next
      pages += 1
    } while (next !== null)
    expect(pages).toBe(3)
    expect(new Set(seen)).toEqual(new Set(ids))
    expect(seen).toHaveLength(65)
    expect(ids.slice(-2)).toContain(seen[0])
    expect((await site.as(owner).get('/api/guides?cursor=nonsense')).problem().kind).toBe('bad-request')
  })

  test('one with two roles is listed once with both', async () => {
    const { owner, id } = await start()
    site.give(owner, id, 'translator', 'ar')
    const { guides } = (await site.as(owner).get('/api/guides')).read(GuidePage)
    expect(guides.map((guide) => guide.roles.toSorted())).toEqual([['owner', 'translator']])
  })

  test('one that was never published is removed with its draft and documents', async () => {
    const { owner, id, first } = await start('To be removed')
    await save(owner, id, title(first, 'To be removed soon'), 1)
    expect((await site.as(owner).delete(`/api/guides/${id}`)).status).toBe(204)
    expect((await site.as(owner).get(`/api/guides/${id}/draft`)).problem().kind).toBe('not-found')
    expect(
      site.ctx.db
        .select()
        .from(documents)
        .all()
        .some((row) => row.json.includes('To be removed')),
    ).toBe(false)
  })
})
