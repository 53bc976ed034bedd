import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { insertNode } from '../../../../shared/guide/edit'
import { emptyDocument, emptyStep } from '../../../../shared/guide/emptyDocument'
import { merge, type Conflict } from '../../../../shared/guide/merge'
import type { GuideDocument } from '../../../../shared/guide/schema'
import { hashOf } from '../../../../shared/lib/json/hash'
import {
  answered,
  changed,
  isUnsent,
  looked,
  maySend,
  refused,
  sent,
  startSaving,
  takeUp,
  toKeep,
  unanswered,
  type Saving,
} from './saving'

let counter = 0
const newId = () => `node${String((counter += 1)).padStart(10, '0')}`
const begin = (): GuideDocument => emptyDocument(newId, { lang: 'en', title: 'Pump' })

/** The site's part, in memory, with the real merge. */
class Site {
  private readonly states: GuideDocument[]
  readonly conflicts: Conflict[] = []
  constructor(first: GuideDocument) {
    this.states = [first]
  }
  look() {
    return { document: this.states.at(-1)!, version: this.states.length - 1 }
  }
  save({ document, version }: { document: GuideDocument; version: number }) {
    const now = this.look()
    const late = version !== now.version
    const both = late
      ? merge(this.states[version]!, document, now.document, 'theirs')
      : { document, conflicts: [] }
    this.states.push(both.document)
    this.conflicts.push(...both.conflicts)
    return { ...this.look(), merged: late }
  }
}

interface Request {
  document: GuideDocument
  version: number
  answer?: ReturnType<Site['save']>
}

/** A page with the wire between it and the site, on which every request can be slow, lost, or lose its answer. */
class Page {
  saving: Saving
  wire: Request | null = null
  constructor(private readonly site: Site) {
    this.saving = startSaving(site.look())
  }
  send() {
    if (!maySend(this.saving)) return
    this.wire = { document: this.saving.document, version: this.saving.version }
    this.saving = sent(this.saving)
  }
  arrive() {
    if (this.wire !== null && this.wire.answer === undefined) this.wire.answer = this.site.save(this.wire)
  }
  hear() {
    if (this.wire?.answer === undefined) return
    this.saving = answered(this.saving, this.wire.answer)
    this.wire = null
  }
  drop() {
    if (this.wire === null) return
    this.saving = unanswered(this.saving)
    this.wire = null
  }
  look() {
    this.saving = looked(this.saving, this.site.look())
  }
  /** The tab closes with what was kept on the device, and is opened again. What it had sent may be on its way still. */
  reopen() {
    const kept = structuredClone(toKeep(this.saving, 0))
    this.wire = null
    const unsent = isUnsent(this.saving) || this.saving.lost !== null
    this.saving = unsent ? takeUp(kept, this.site.look()) : startSaving(this.site.look())
  }
  /** The network is good again. */
  finish() {
    this.arrive()
    this.hear()
    for (let tries = 0; tries < 20; tries += 1) {
      if (this.saving.lost !== null) this.look()
      if (!maySend(this.saving)) break
      this.send()
      this.arrive()
      this.hear()
    }
    this.look()
  }
}

const acts = ['type', 'add', 'send', 'arrive', 'hear', 'drop', 'look', 'reopen'] as const
const play = fc.array(fc.record({ page: fc.nat(1), act: fc.constantFrom(...acts) }), {
  minLength: 5,
  maxLength: 60,
})

describe('saving', () => {
  test('loses nothing, whatever is dropped, late or written by two at once', () => {
    fc.assert(
      fc.property(play, (moves) => {
        counter = 0
        const first = begin()
        const section = first.sections[0]!.id
        const site = new Site(first)
        const pages = [new Page(site), new Page(site)]
        const added: string[] = []
        const written = new Set<string>()
        const overwritten = new Set<string>()
        moves.forEach(({ page: at, act }, index) => {
          const page = pages[at]!
          const { document } = page.saving
          if (act === 'type') {
            // A person who writes over a text has seen it: that text may go. Every other one must be found again.
            overwritten.add(document.title)
            written.add(`title ${index}`)
            page.saving = changed(page.saving, { ...document, title: `title ${index}` })
          } else if (act === 'add') {
            const step = emptyStep(newId, `step ${index}`)
            added.push(step.id)
            page.saving = changed(page.saving, insertNode(document, 'step', step, section))
          } else page[act]()
        })
        for (const page of [...pages, ...pages]) page.finish()
        const end = site.look().document
        const there = end.sections.flatMap((each) => each.steps.map((step) => step.id))
        expect(new Set(there)).toEqual(new Set([first.sections[0]!.steps[0]!.id, ...added]))
        expect(there).toHaveLength(added.length + 1)
        const found = new Set([
          end.title,
          ...site.conflicts.flatMap((conflict) => [conflict.mine, conflict.theirs]),
        ])
        for (const title of written) if (!overwritten.has(title)) expect(found).toContain(title)
        for (const page of pages) {
          expect(hashOf(page.saving.document)).toBe(hashOf(end))
          expect(isUnsent(page.saving)).toBe(false)
        }
      }),
      { seed: 20261201, numRuns: 1500 },
    )
  })

  test('alone with a bad network never meets itself: there is no conflict where one page alone writes', () => {
    const alone = fc.array(fc.constantFrom(...acts), { minLength: 5, maxLength: 60 })
    fc.assert(
      fc.property(alone, (moves) => {
        counter = 0
        const site = new Site(begin())
        const page = new Page(site)
        moves.forEach((act, index) => {
          const { document } = page.saving
          if (act === 'type') page.saving = changed(page.saving, { ...document, title: `title ${index}` })
          else if (act !== 'add') page[act]()
        })
        const last = page.saving.document.title
        page.finish()
        expect(site.conflicts).toEqual([])
        expect(site.look().document.title).toBe(last)
      }),
      { seed: 20261201, numRuns: 1000 },
    )
  })

  test('puts what was typed meanwhile on top of the answer', () => {
    const first = begin()
    const site = new Site(first)
    const [mine, theirs] = [new Page(site), new Page(site)]
    theirs.saving = changed(theirs.saving, { ...first, summary: 'theirs' })
    theirs.finish()
    mine.saving = changed(mine.saving, { ...first, title: 'a' })
    mine.send()
    mine.saving = changed(mine.saving, { ...mine.saving.document, title: 'ab' })
    mine.arrive()
    mine.hear()
    expect(mine.saving.document).toMatchObject({ title: 'ab', summary: 'theirs' })
    expect(isUnsent(mine.saving)).toBe(true)
  })

  test('after a refusal goes on holding the change, and may send it again', () => {
    const first = begin()
    const saving = refused(
      sent(changed(startSaving({ document: first, version: 0 }), { ...first, title: 'a' })),
    )
    expect(maySend(saving)).toBe(true)
    expect(saving.document.title).toBe('a')
  })

  test('what was kept on the device and is on the site already is not sent again', () => {
    const first = begin()
    const site = new Site(first)
    const page = new Page(site)
    page.saving = changed(page.saving, { ...first, title: 'a' })
    page.send()
    page.arrive() // The answer never comes: the tab was closed.
    page.reopen()
    expect(isUnsent(page.saving)).toBe(false)
    expect(page.saving.version).toBe(1)
  })
})
