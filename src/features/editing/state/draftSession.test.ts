// @vitest-environment happy-dom
import { afterEach, beforeEach, describe, expect, test, vi } from 'vitest'
import type { Draft, DraftConflict, SavedDraft } from '../../../../shared/api/drafts'
import type { FileEntry } from '../../../../shared/api/files'
import { emptyDocument } from '../../../../shared/guide/emptyDocument'
import { merge } from '../../../../shared/guide/merge'
import type { GuideDocument } from '../../../../shared/guide/schema'
import { NoAnswer, RequestProblem } from '../../../lib/request'
import { DraftSession, type DraftView, type Outside } from './draftSession'
import type { KeptChanges } from './saving'

let counter = 0
const newId = () => `node${String((counter += 1)).padStart(10, '0')}`
const settle = () => vi.advanceTimersByTimeAsync(0)

const fileOf = (state: FileEntry['state']): FileEntry => ({
  sha256: 'a'.repeat(64),
  kind: 'picture',
  mediaType: 'image/jpeg',
  bytes: 10,
  name: 'bracket.jpg',
  state,
  trouble: null,
  picture: null,
  model: null,
  renditions: [],
})

/** The site and the device, in memory; `fails` is what the next saves come to. */
class World {
  states: GuideDocument[] = [emptyDocument(newId, { lang: 'en', title: 'Pump' })]
  conflicts: DraftConflict[] = []
  saves = 0
  fails: Error | null = null
  looks = 0
  kept: KeptChanges | null = null
  keepFails = false
  left: KeptChanges[] = []
  file = fileOf('working')
  lastWords: GuideDocument[] = []
  private latest = () => ({ document: this.states.at(-1)!, version: this.states.length - 1 })

  readonly outside: Outside = {
    fetchDraft: () => {
      this.looks += 1
      if (this.fails instanceof NoAnswer) return Promise.reject(this.fails)
      const guide = {
        id: 'guide',
        slug: 'pump',
        title: 'Pump',
        byline: '',
        roles: ['owner' as const],
        version: this.latest().version,
        updatedAt: '2026-12-01T12:00:00.000Z',
        updatedByName: null,
        latest: null,
      }
      return Promise.resolve<Draft>({ guide, ...this.latest(), conflicts: this.conflicts, files: [] })
    },
    saveDraft: (document, version) => {
      this.saves += 1
      return this.fails === null ? Promise.resolve(this.save(document, version)) : Promise.reject(this.fails)
    },
    saveWhileClosing: (document) => {
      this.lastWords.push(document)
      return true
    },
    sayHere: () => Promise.resolve({ version: this.latest().version, also: [{ name: 'Tobin', step: null }] }),
    settleConflict: (id) => {
      this.conflicts = this.conflicts.filter((conflict) => conflict.id !== id)
      return Promise.resolve({})
    },
    sendFiles: (files, onProgress) => {
      onProgress(0.5)
      return Promise.resolve({
        files: files.filter(({ name }) => name.endsWith('.jpg')).map(() => this.file),
        refused: files
          .filter(({ name }) => !name.endsWith('.jpg'))
          .map(({ name }) => ({ name, sentence: 'Not a picture.' })),
      })
    },
    fetchFiles: () => Promise.resolve({ files: [this.file] }),
    kept: {
      keep: (changes) => {
        if (this.keepFails) return Promise.reject(new DOMException('full', 'QuotaExceededError'))
        this.kept = structuredClone(changes)
        return Promise.resolve()
      },
      forget: () => {
        this.kept = null
        return Promise.resolve()
      },
      left: () =>
        Promise.resolve(
          this.left.map((changes) => ({
            changes,
            drop: () => {
              this.left = this.left.filter((each) => each !== changes)
              return Promise.resolve()
            },
          })),
        ),
      hold: () => undefined,
      letGo: () => undefined,
    },
    now: () => Date.now(),
  }

  private save(document: GuideDocument, version: number): SavedDraft {
    const late = version !== this.latest().version
    const both = late
      ? merge(this.states[version]!, document, this.latest().document, 'theirs')
      : { document, conflicts: [] }
    this.states.push(both.document)
    const conflicts = both.conflicts.map((conflict, index): DraftConflict => ({
      ...conflict,
      id: `conflict-${index}`,
      mineByName: 'Ines',
      theirsByName: 'Tobin',
      createdAt: '2026-12-01T12:00:00.000Z',
    }))
    this.conflicts.push(...conflicts)
    return { ...this.latest(), merged: late, conflicts, savedAt: '2026-12-01T12:00:00.000Z' }
  }

  others(change: (document: GuideDocument) => GuideDocument): void {
    this.states.push(change(this.latest().document))
  }
  get document(): GuideDocument {
    return this.latest().document
  }
}

const refusal = (kind: string, status: number): RequestProblem =>
  new RequestProblem({ type: `/problems/${kind}`, status, title: kind })

let world: World
let session: DraftSession
const view = (): DraftView => {
  const seen = session.look()
  if (seen.is !== 'open') throw new Error(`The draft is ${seen.is}.`)
  return seen.draft
}
const title = (text: string) => (document: GuideDocument) => ({ ...document, title: text })

beforeEach(() => {
  vi.useFakeTimers()
  world = new World()
  session = new DraftSession(world.outside)
})
afterEach(() => {
  session.close()
  vi.useRealTimers()
})

describe('saving', () => {
  test('waits 800 ms after the last change, and no longer than 5 s in all', async () => {
    await session.open()
    session.edit(title('a'))
    await vi.advanceTimersByTimeAsync(799)
    expect(world.saves).toBe(0)
    await vi.advanceTimersByTimeAsync(1)
    expect(world.saves).toBe(1)
    expect(view().save.is).toBe('kept')
    for (let n = 0; n < 20; n += 1) {
      session.edit(title(`b${n}`))
      await vi.advanceTimersByTimeAsync(300)
    }
    expect(world.saves).toBeGreaterThanOrEqual(2)
    expect(world.saves).toBeLessThan(5)
  })

  test('without network keeps everything on the device and tries again by itself', async () => {
    await session.open()
    world.fails = new NoAnswer('no')
    session.edit(title('a'))
    await vi.advanceTimersByTimeAsync(1000)
    expect(view().save.is).toBe('no network')
    expect(world.kept?.document.title).toBe('a')
    session.edit(title('ab'))
    await vi.advanceTimersByTimeAsync(600)
    expect(world.kept?.document.title).toBe('ab')
    world.fails = null
    await vi.advanceTimersByTimeAsync(60_000)
    expect(view().save.is).toBe('kept')
    expect(world.document.title).toBe('ab')
    expect(world.kept).toBeNull()
  })

  test.each([
    ['not-signed-in', 401, 'sign in'],
    ['too-large', 413, 'too large'],
    ['bad-request', 400, 'wrong'],
    ['no-space', 507, 'full'],
    ['not-allowed', 403, 'not allowed'],
    ['internal', 500, 'later'],
  ] as const)(
    'refused as %s (%i) it says so, keeps it, and saves it once that is mended',
    async (kind, status, why) => {
      await session.open()
      world.fails = refusal(kind, status)
      session.edit(title('a'))
      await vi.advanceTimersByTimeAsync(1000)
      expect(view().save).toMatchObject({ is: 'refused', why })
      expect(view().document.title).toBe('a')
      expect(world.kept?.document.title).toBe('a')
      world.fails = null
      session.edit(title('ab'))
      await vi.advanceTimersByTimeAsync(1000)
      expect(world.document.title).toBe('ab')
      expect(view().save.is).toBe('kept')
    },
  )

  test('a request that cannot succeed is not sent again and again', async () => {
    await session.open()
    world.fails = refusal('too-large', 413)
    session.edit(title('a'))
    await vi.advanceTimersByTimeAsync(120_000)
    expect(world.saves).toBe(1)
  })

  test('a browser that keeps nothing is said, and closing then asks', async () => {
    await session.open()
    world.keepFails = true
    world.fails = refusal('not-signed-in', 401)
    session.edit(title('a'))
    await vi.advanceTimersByTimeAsync(1000)
    expect(view().keptHere).toBe(false)
    world.outside.saveWhileClosing = () => false
    expect(session.closing()).toBe(true)
  })
})

describe('opening', () => {
  test('takes up what an earlier page kept, and sends it as a late save', async () => {
    const base = world.document
    world.left = [{ document: { ...base, title: 'mine' }, base, version: 0, lost: null, at: 1 }]
    world.others((document) => ({ ...document, summary: 'theirs' }))
    await session.open()
    expect(view()).toMatchObject({ tookUp: true, document: { title: 'mine' } })
    await vi.advanceTimersByTimeAsync(100)
    expect(world.document).toMatchObject({ title: 'mine', summary: 'theirs' })
    expect(view().document.summary).toBe('theirs')
    expect(world.left).toEqual([])
    expect(world.kept).toBeNull()
  })

  test('sends what several closed pages left, one after the other', async () => {
    const base = world.document
    world.left = [
      { document: { ...base, title: 'one' }, base, version: 0, lost: null, at: 1 },
      { document: { ...base, summary: 'two' }, base, version: 0, lost: null, at: 2 },
    ]
    await session.open()
    await vi.advanceTimersByTimeAsync(2000)
    expect(world.document).toMatchObject({ title: 'one', summary: 'two' })
    expect(view().document).toMatchObject({ title: 'one', summary: 'two' })
    expect(world.left).toEqual([])
  })
})

describe('others', () => {
  test('appear with what they save, while this page has nothing unsent', async () => {
    await session.open()
    world.others(title('theirs'))
    await vi.advanceTimersByTimeAsync(11_000)
    expect(view().document.title).toBe('theirs')
    expect(view().also).toEqual([{ name: 'Tobin', step: null }])
  })

  test('and this page meeting in one field: both versions are shown until one is chosen', async () => {
    await session.open()
    world.others(title('theirs'))
    session.edit(title('mine'))
    await vi.advanceTimersByTimeAsync(1000)
    expect(view().conflicts).toMatchObject([{ mine: 'mine', theirs: 'theirs' }])
    await session.settle('conflict-0', 'theirs')
    await settle()
    expect(view().conflicts).toEqual([])
  })

  test('undo takes back the own change and leaves theirs', async () => {
    await session.open()
    session.edit(title('mine'))
    await vi.advanceTimersByTimeAsync(1000)
    world.others((document) => ({ ...document, summary: 'theirs' }))
    await vi.advanceTimersByTimeAsync(11_000)
    session.undo()
    expect(view().document).toMatchObject({ title: 'Pump', summary: 'theirs' })
    expect(view()).toMatchObject({ canUndo: false, canRedo: true })
  })
})

describe('closing', () => {
  test('sends the last words, and does not doubt what is kept', async () => {
    await session.open()
    session.edit(title('last'))
    expect(session.closing()).toBe(false)
    expect(world.lastWords.map((document) => document.title)).toEqual(['last'])
    await settle()
    expect(world.kept?.document.title).toBe('last')
  })

  test('within the application saves what is unsent', async () => {
    await session.open()
    session.edit(title('last'))
    session.close()
    await settle()
    expect(world.document.title).toBe('last')
  })
})

describe('files', () => {
  test('become assets of the document, and are asked for until they are ready', async () => {
    await session.open()
    const brought = await session.bringFiles([new File(['x'], 'bracket.jpg'), new File(['x'], 'notes.exe')])
    expect(brought).toHaveLength(1)
    expect(view().document.assets.map((asset) => asset.name)).toEqual(['bracket.jpg'])
    expect(view().refusedFiles).toEqual([{ name: 'notes.exe', why: 'Not a picture.' }])
    expect(view().canUndo).toBe(false)
    world.file = fileOf('ready')
    await vi.advanceTimersByTimeAsync(2000)
    expect(view().files.get('a'.repeat(64))?.state).toBe('ready')
    expect(view().sending).toEqual([])
  })

  test('that could not be sent are named', async () => {
    await session.open()
    world.outside.sendFiles = () => Promise.reject(new NoAnswer('no'))
    expect(await session.bringFiles([new File(['x'], 'bracket.jpg')])).toEqual([])
    expect(view().refusedFiles[0]?.name).toBe('bracket.jpg')
  })
})
