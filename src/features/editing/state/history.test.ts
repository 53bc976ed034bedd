import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { insertNode, removeNode, setNode } from '../../../../shared/guide/edit'
import { emptyDocument, emptyStep } from '../../../../shared/guide/emptyDocument'
import type { GuideDocument } from '../../../../shared/guide/schema'
import { hashOf } from '../../../../shared/lib/json/hash'
import { NO_HISTORY, redo, remember, undo, type History } from './history'

let counter = 0
const newId = () => `node${String((counter += 1)).padStart(10, '0')}`

function start(): GuideDocument {
  counter = 0
  const document = emptyDocument(newId, { lang: 'en', title: 'Pump' })
  const section = document.sections[0]!.id
  return [1, 2, 3].reduce((doc) => insertNode(doc, 'step', emptyStep(newId), section), document)
}

const steps = (document: GuideDocument) => document.sections.flatMap((section) => section.steps)

type Deed = { do: 'title' | 'minutes' | 'add' | 'remove'; at: number; value: number }
const deeds = fc.array(
  fc.record({
    do: fc.constantFrom('title' as const, 'minutes' as const, 'add' as const, 'remove' as const),
    at: fc.nat(9),
    value: fc.nat(999),
  }),
  { maxLength: 12 },
)

function apply(document: GuideDocument, deed: Deed): GuideDocument {
  const step = steps(document)[deed.at % Math.max(1, steps(document).length)]
  if (deed.do === 'add') {
    return insertNode(
      document,
      'step',
      emptyStep(newId, `Step ${deed.value}`),
      document.sections[0]!.id,
      deed.at,
    )
  }
  if (step === undefined) return document
  if (deed.do === 'title') return setNode(document, 'step', step.id, { title: `Title ${deed.value}` })
  if (deed.do === 'minutes') return setNode(document, 'step', step.id, { minutes: deed.value })
  return removeNode(document, 'step', step.id)
}

function run(document: GuideDocument, list: readonly Deed[]): { document: GuideDocument; history: History } {
  let history = NO_HISTORY
  let now = document
  list.forEach((deed, index) => {
    const after = apply(now, deed)
    history = remember(history, now, after, index * 10_000)
    now = after
  })
  return { document: now, history }
}

describe('undo', () => {
  test('of every deed gives the same hash at each step back, and redo at each step forward', () => {
    fc.assert(
      fc.property(deeds, (list) => {
        const first = start()
        const hashes = [hashOf(first)]
        let history = NO_HISTORY
        let now = first
        list.forEach((deed, index) => {
          const after = apply(now, deed)
          if (after === now) return
          history = remember(history, now, after, index * 10_000)
          now = after
          hashes.push(hashOf(now))
        })
        for (let back = hashes.length - 2; back >= 0; back -= 1) {
          const went = undo(history, now)!
          ;({ document: now, history } = went)
          expect(hashOf(now)).toBe(hashes[back])
        }
        expect(undo(history, now)).toBeUndefined()
        for (const hash of hashes.slice(1)) {
          const went = redo(history, now)!
          ;({ document: now, history } = went)
          expect(hashOf(now)).toBe(hash)
        }
      }),
      { seed: 20261201, numRuns: 300 },
    )
  })

  test('takes back only its own: what others changed in other places in between stays', () => {
    fc.assert(
      fc.property(deeds, fc.nat(999), (list, value) => {
        const first = start()
        const { document, history } = run(first, list)
        const others = {
          ...document,
          summary: `Summary ${value}`,
          skills: [{ id: newId(), name: 'Drilling' }],
        }
        let now: GuideDocument = others
        let rest = history
        for (let went = undo(rest, now); went !== undefined; went = undo(rest, now)) {
          ;({ document: now, history: rest } = went)
        }
        expect(hashOf(now)).toBe(hashOf({ ...first, summary: others.summary, skills: others.skills }))
      }),
      { seed: 20261201, numRuns: 200 },
    )
  })

  test('of typing in one field is one step, until two seconds have passed or somebody else changed something', () => {
    const first = start()
    const a = { ...first, title: 'a' }
    const ab = { ...first, title: 'ab' }
    const typed = remember(remember(NO_HISTORY, first, a, 0, 'title'), a, ab, 1500, 'title')
    expect(typed.past).toHaveLength(1)
    expect(undo(typed, ab)!.document).toBe(first)
    const late = remember(remember(NO_HISTORY, first, a, 0, 'title'), a, ab, 2500, 'title')
    expect(late.past).toHaveLength(2)
    const others = { ...a, summary: 'theirs' }
    const between = remember(
      remember(NO_HISTORY, first, a, 0, 'title'),
      others,
      { ...others, title: 'ab' },
      9,
      'title',
    )
    expect(between.past).toHaveLength(2)
  })

  test('ends what could be redone as soon as something new is done', () => {
    const first = start()
    const a = { ...first, title: 'a' }
    const back = undo(remember(NO_HISTORY, first, a, 0), a)!
    expect(back.history.future).toHaveLength(1)
    expect(remember(back.history, first, { ...first, title: 'b' }, 1).future).toHaveLength(0)
  })
})
