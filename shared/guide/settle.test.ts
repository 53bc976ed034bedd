import { expect, test } from 'vitest'
import { insertNode, moveNode, removeNode, setNode } from './edit'
import { emptyDocument, emptyStep } from './emptyDocument'
import { merge } from './merge'
import { repeatedId } from './repeatedId'
import type { GuideDocument } from './schema'
import { settle, valueAt } from './settle'

let count = 0
const newId = (): string => `node${String((count += 1)).padStart(12, '0')}`

function guide(): GuideDocument {
  let doc = emptyDocument(newId, { lang: 'en', title: 'Pump' })
  doc = insertNode(doc, 'section', { id: 'sectionB0000', title: 'B', steps: [] }, null)
  doc = insertNode(doc, 'section', { id: 'sectionC0000', title: 'C', steps: [] }, null)
  for (const name of ['one', 'two', 'three']) {
    doc = insertNode(doc, 'step', { ...emptyStep(newId, name), id: `step${name}000000` }, doc.sections[0]!.id)
  }
  return doc
}
const places = (doc: GuideDocument): string[][] =>
  doc.sections.map((section) => section.steps.map((step) => step.title))

/** Merges, expects one conflict, and settles it each way. */
function both(base: GuideDocument, mine: GuideDocument, theirs: GuideDocument) {
  const { document, conflicts } = merge(base, mine, theirs)
  expect(conflicts).toHaveLength(1)
  const [conflict] = conflicts
  return {
    conflict: conflict!,
    document,
    mine: settle(document, conflict!, 'mine'),
    theirs: settle(document, conflict!, 'theirs'),
  }
}

test('both moved one step: settling for mine moves it, for theirs leaves it', () => {
  const base = guide()
  const mine = moveNode(base, 'step', 'steptwo000000', 'sectionB0000', 0)
  const theirs = moveNode(base, 'step', 'steptwo000000', 'sectionC0000', 0)
  const settled = both(base, mine, theirs)
  expect(places(settled.document)).toEqual(places(theirs))
  expect(places(settled.mine!)).toEqual(places(mine))
  expect(settled.theirs).toBe(settled.document)
  expect(valueAt(mine, settled.conflict)).toBe(settled.conflict.mine)
  expect(valueAt(theirs, settled.conflict)).toBe(settled.conflict.theirs)
})

test('both reordered: settling for mine gives its order, and what came in since keeps its place', () => {
  const base = guide()
  const owner = base.sections[0]!.id
  const mine = moveNode(base, 'step', 'stepthree000000', owner, 0)
  const theirs = moveNode(base, 'step', 'stepone000000', owner, 3)
  const { conflict, document } = both(base, mine, theirs)
  const grown = insertNode(document, 'step', emptyStep(newId, 'new'), owner)
  expect(places(settle(grown, conflict, 'mine')!)[0]).toEqual([...places(mine)[0]!, 'new'])
})

test('changed and removed: whoever removed it can have it removed, whoever changed it keeps it', () => {
  const base = guide()
  const changed = setNode(base, 'step', 'steptwo000000', { title: 'two, mended' })
  const removed = removeNode(base, 'step', 'steptwo000000')
  const mineRemoved = both(base, removed, changed)
  expect(places(mineRemoved.mine!)).toEqual(places(removed))
  expect(places(mineRemoved.theirs!)).toEqual(places(changed))
  const theirsRemoved = both(base, changed, removed)
  expect(places(theirsRemoved.mine!)).toEqual(places(changed))
  expect(places(theirsRemoved.theirs!)).toEqual(places(removed))
})

test('a field that mine took away is taken away', () => {
  const base = setNode(guide(), 'step', 'steptwo000000', { when: [] })
  const mine = setNode(base, 'step', 'steptwo000000', { when: undefined })
  const theirs = setNode(base, 'step', 'steptwo000000', {
    when: [{ line: 'line00000001', is: ['option000001'] }],
  })
  const settled = both(base, mine, theirs)
  expect('when' in settled.mine!.sections[0]!.steps[2]!).toBe(false)
})

test('a place that is gone takes nothing', () => {
  const base = guide()
  const named = (title: string): GuideDocument => setNode(base, 'step', 'steptwo000000', { title })
  const { conflict, document } = both(base, named('mine'), named('theirs'))
  expect(settle(removeNode(document, 'step', 'steptwo000000'), conflict, 'mine')).toBeUndefined()
})

test('a repeated id is found wherever it stands', () => {
  const doc = guide()
  expect(repeatedId(doc)).toBeUndefined()
  const twice = insertNode(doc, 'tool', { id: 'steptwo000000', name: 'Saw' }, null)
  expect(repeatedId(twice)).toBe('steptwo000000')
})
