import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { hashOf } from '../lib/json/hash'
import { insertNode, moveNode, removeNode, setNode } from './edit'
import { merge } from './merge'
import { repeatedId } from './repeatedId'
import { GuideDocument, type Block, type Step } from './schema'
import { stepsOf } from './stepsOf'
import { arbitraryDocument, DocumentMaker } from './testing/arbitraryDocument'
import { editSome } from './testing/arbitraryEdit'
import { arbitraryDraws, Draws } from './testing/draws'

const SEED = { seed: 20261201, numRuns: 100 }
const copyOf = (doc: GuideDocument): GuideDocument => structuredClone(doc)

/** A base and what two people made of it, neither knowing of the other. */
const arbitraryTwo = fc
  .tuple(arbitraryDocument, arbitraryDraws(200), arbitraryDraws(200))
  .map(([base, forMine, forTheirs]) => ({
    base,
    mine: editSome(base, forMine, 'mine'),
    theirs: editSome(base, forTheirs, 'theirs'),
  }))

/** Every text that a person wrote, anywhere in a value. */
function textsOf(value: unknown, texts = new Set<string>()): Set<string> {
  if (typeof value === 'string') texts.add(value)
  else if (typeof value === 'object' && value !== null)
    for (const child of Object.values(value)) textsOf(child, texts)
  return texts
}

describe('laws', () => {
  test('what only one side changed is taken as it is, whether or not the documents share their parts', () => {
    fc.assert(
      fc.property(arbitraryDocument, arbitraryDraws(200), (a, draws) => {
        const b = editSome(a, draws, 'mine')
        for (const [x, y, z] of [
          [a, a, b],
          [a, b, a],
          [a, b, b],
          [a, copyOf(a), copyOf(b)],
          [a, copyOf(b), copyOf(a)],
          [a, copyOf(b), copyOf(b)],
        ] as const) {
          const merged = merge(x, y, z)
          expect(hashOf(merged.document)).toBe(hashOf(b))
          expect(merged.conflicts).toEqual([])
        }
      }),
      SEED,
    )
  })

  test('whether parts are shared makes no difference', () => {
    fc.assert(
      fc.property(arbitraryTwo, ({ base, mine, theirs }) => {
        const apart = merge(base, copyOf(mine), copyOf(theirs))
        const shared = merge(base, mine, theirs)
        expect(hashOf(shared.document)).toBe(hashOf(apart.document))
        expect(shared.conflicts).toEqual(apart.conflicts)
      }),
      SEED,
    )
  })

  test('the sides exchanged, and the preference with them, give the same', () => {
    fc.assert(
      fc.property(arbitraryTwo, ({ base, mine, theirs }) => {
        const one = merge(base, mine, theirs, 'mine')
        const other = merge(base, theirs, mine, 'theirs')
        expect(hashOf(one.document)).toBe(hashOf(other.document))
        expect(one.conflicts).toHaveLength(other.conflicts.length)
      }),
      SEED,
    )
  })

  test('the result is a valid document and no id stands twice', () => {
    fc.assert(
      fc.property(arbitraryTwo, fc.constantFrom('mine' as const, 'theirs' as const), (two, prefer) => {
        const { document } = merge(two.base, two.mine, two.theirs, prefer)
        expect(GuideDocument.safeParse(document).error?.issues).toBeUndefined()
        expect(repeatedId(document)).toBeUndefined()
      }),
      SEED,
    )
  })

  test('nothing that either side wrote is lost: it is in the document or in a conflict', () => {
    fc.assert(
      fc.property(arbitraryTwo, ({ base, mine, theirs }) => {
        const merged = merge(base, mine, theirs)
        const [had, kept] = [textsOf(base), textsOf(merged)]
        for (const side of [mine, theirs])
          for (const text of textsOf(side)) if (!had.has(text)) expect(kept).toContain(text)
      }),
      SEED,
    )
  })

  test('undo gives back the document before, with the same hash', () => {
    fc.assert(
      fc.property(arbitraryDocument, arbitraryDraws(200), (before, draws) => {
        const after = editSome(before, draws, 'mine')
        expect(hashOf(merge(after, before, after).document)).toBe(hashOf(before))
        expect(hashOf(merge(after, before, copyOf(after)).document)).toBe(hashOf(before))
      }),
      SEED,
    )
  })

  test('undo takes back only its own step when another author changed another node since', () => {
    fc.assert(
      fc.property(arbitraryDocument, arbitraryDraws(100), (before, draws) => {
        const first = stepsOf(before)[0]!
        const after = setNode(before, 'step', first.id, { title: 'mine', minutes: draws.below(9) + 100 })
        const added = new DocumentMaker(draws, 'theirs').step()
        const now = insertNode(after, 'step', added, before.sections[0]!.id)
        const expected = insertNode(before, 'step', added, before.sections[0]!.id)
        expect(hashOf(merge(after, before, now).document)).toBe(hashOf(expected))
      }),
      SEED,
    )
  })
})

/** Steps a, b, c … in one section, each with a paragraph. */
function guideOf(...titles: string[]): GuideDocument {
  const blank = new DocumentMaker(new Draws([]), 'case').document()
  return { ...blank, sections: [{ id: 'section-000001', title: 'A', steps: titles.map(stepOf) }] }
}
const idOf = (title: string): string => `step-0000000${title.slice(0, 1)}`
const paragraph = (id: string, text: string): Block => ({
  type: 'paragraph',
  attrs: { id },
  content: [{ type: 'text', text }],
})
function stepOf(title: string): Step {
  const step = new DocumentMaker(new Draws([]), title).step(idOf(title))
  return { ...step, title, body: { type: 'doc', content: [paragraph(`paragraph-0${title}`, title)] } }
}
const titles = (doc: GuideDocument): string =>
  stepsOf(doc)
    .map(({ title }) => title)
    .join(' ')
const retitle = (doc: GuideDocument, step: string, title: string): GuideDocument =>
  setNode(doc, 'step', idOf(step), { title })

/**
 * The cases of the reference data "Three-way merge: invariants, not exact text" (our own, after Khanna, Kunal and Pierce, A Formal
 * Investigation of Diff3, 2007), as steps of a guide.
 */
describe('cases', () => {
  const base = guideOf('1', '2', '3', '4', '5', '6')

  test('far apart: both, and no conflict', () => {
    const merged = merge(base, retitle(base, '2', '7'), retitle(base, '5', '8'))
    expect(titles(merged.document)).toBe('1 7 3 4 8 6')
    expect(merged.conflicts).toEqual([])
  })

  test('same change: once, and no conflict', () => {
    const merged = merge(base, retitle(base, '2', '4'), retitle(copyOf(base), '2', '4'))
    expect(titles(merged.document)).toBe('1 4 3 4 5 6')
    expect(merged.conflicts).toEqual([])
  })

  test('same place: a conflict with base, mine and theirs', () => {
    const merged = merge(base, retitle(base, '2', '4'), retitle(base, '2', '5'))
    expect(merged.conflicts).toEqual([
      { node: idOf('2'), field: 'title', why: 'both changed', base: '2', mine: '4', theirs: '5' },
    ])
  })

  test('Khanna, Kunal and Pierce: the moves of both, nothing lost', () => {
    const reorder = (order: string): GuideDocument => ({
      ...base,
      sections: [
        {
          ...base.sections[0]!,
          steps: order.split(' ').map((title) => stepsOf(base).find((step) => step.title === title)!),
        },
      ],
    })
    const merged = merge(base, reorder('1 4 5 2 3 6'), reorder('1 2 4 5 3 6'))
    expect(titles(merged.document).split(' ').sort().join(' ')).toBe('1 2 3 4 5 6')
    expect(merged.conflicts).toMatchObject([{ why: 'both reordered' }])
  })

  test('delete and edit: a conflict, and the edited one stays', () => {
    const merged = merge(base, removeNode(base, 'step', idOf('2')), retitle(base, '2', '2 edited'))
    expect(titles(merged.document)).toBe('1 2 edited 3 4 5 6')
    expect(merged.conflicts).toMatchObject([{ node: idOf('2'), why: 'changed and removed' }])
  })

  test('move and edit: moved and edited, no conflict', () => {
    const moved = moveNode(base, 'step', idOf('1'), 'section-000001', 5)
    const merged = merge(base, moved, retitle(base, '1', '1 edited'))
    expect(titles(merged.document)).toBe('2 3 4 5 6 1 edited')
    expect(merged.conflicts).toEqual([])
  })

  test('move into a new section and edit: the edit goes along', () => {
    const moved = moveNode(
      insertNode(base, 'section', { id: 'section-000002', title: 'B', steps: [] }, null),
      'step',
      idOf('1'),
      'section-000002',
      0,
    )
    const merged = merge(base, moved, retitle(base, '1', '1 edited'))
    expect(titles(merged.document)).toBe('2 3 4 5 6 1 edited')
    expect(merged.conflicts).toEqual([])
  })

  test('moved to two places: a conflict on the place, the step once', () => {
    const two = insertNode(base, 'section', { id: 'section-000002', title: 'B', steps: [] }, null)
    const three = insertNode(two, 'section', { id: 'section-000003', title: 'C', steps: [] }, null)
    const merged = merge(
      three,
      moveNode(three, 'step', idOf('1'), 'section-000002', 0),
      moveNode(three, 'step', idOf('1'), 'section-000003', 0),
    )
    expect(titles(merged.document)).toBe('2 3 4 5 6 1')
    expect(merged.conflicts).toMatchObject([{ node: idOf('1'), why: 'both moved' }])
  })

  test('moved out of a section that is then removed, while the other added to it: once, and the addition stays', () => {
    const two = insertNode(base, 'section', { id: 'section-000002', title: 'B', steps: [] }, null)
    const mine = insertNode(two, 'step', stepOf('x'), 'section-000001', 0)
    const allOut = stepsOf(two).reduce(
      (doc, step) => moveNode(doc, 'step', step.id, 'section-000002', 99),
      two,
    )
    const merged = merge(two, mine, removeNode(allOut, 'section', 'section-000001'))
    expect(titles(merged.document)).toBe('x 1 2 3 4 5 6')
    expect(merged.conflicts).toMatchObject([{ node: 'section-000001', why: 'changed and removed' }])
  })

  test('two inserts at one place: both, in an order that does not hang on who merges', () => {
    const mine = insertNode(base, 'step', stepOf('m'), 'section-000001', 2)
    const theirs = insertNode(base, 'step', stepOf('t'), 'section-000001', 2)
    expect(titles(merge(base, mine, theirs, 'theirs').document)).toBe(
      titles(merge(base, theirs, mine, 'mine').document),
    )
    expect(titles(merge(base, mine, theirs).document).split(' ')).toHaveLength(8)
  })

  test('list item edited while its step is removed: a conflict on the step alone', () => {
    const withText = (text: string): GuideDocument =>
      setNode(base, 'step', idOf('2'), {
        body: {
          type: 'doc',
          content: [
            {
              type: 'orderedList',
              attrs: { id: 'list-00000001' },
              content: [
                {
                  type: 'listItem',
                  attrs: { id: 'item-00000001' },
                  content: [paragraph('paragraph-item', text)],
                },
              ],
            },
          ],
        },
      })
    const listed = withText('turn')
    const merged = merge(listed, removeNode(listed, 'step', idOf('2')), withText('turn slowly'))
    expect(merged.conflicts).toMatchObject([{ node: idOf('2'), why: 'changed and removed' }])
    expect(merged.conflicts).toHaveLength(1)
    expect([...textsOf(merged.document)]).toContain('turn slowly')
  })

  test('number and unit changed apart: a conflict on the quantity as one value', () => {
    const line = { ...new DocumentMaker(new Draws([]), 'case').line(), id: 'line-00000001' }
    const quantity = (value: string, unit: 'mm' | 'cm'): GuideDocument => ({
      ...base,
      lines: [{ ...line, quantity: { value, unit } }],
    })
    const merged = merge(quantity('10', 'mm'), quantity('12', 'mm'), quantity('10', 'cm'))
    expect(merged.conflicts).toEqual([
      {
        node: 'line-00000001',
        field: 'quantity',
        why: 'both changed',
        base: { value: '10', unit: 'mm' },
        mine: { value: '12', unit: 'mm' },
        theirs: { value: '10', unit: 'cm' },
      },
    ])
  })

  test('each side removes another option: the line keeps one, and it is a conflict', () => {
    const line = new DocumentMaker(new Draws([]), 'case').line()
    const [a, b] = ['option-0000a', 'option-0000b'].map((id) => ({ ...line.options[0]!, id }))
    const withOptions = (...options: (typeof line)['options']): GuideDocument => ({
      ...base,
      lines: [{ ...line, options }],
    })
    const merged = merge(withOptions(a!, b!), withOptions(a!), withOptions(b!))
    expect(merged.document.lines[0]!.options.map(({ id }) => id)).toEqual([b!.id])
    expect(merged.conflicts).toMatchObject([{ node: line.id, field: 'options', why: 'both changed' }])
  })

  test('each side puts one block into the other: no circle, both texts stay', () => {
    const list = (id: string, ...content: Block[]): Block => ({ type: 'note', attrs: { id }, content })
    const body = (...content: Block[]): GuideDocument =>
      setNode(base, 'step', idOf('2'), { body: { type: 'doc', content } })
    const [x, y] = [paragraph('paragraph-x-1', 'text x'), paragraph('paragraph-y-1', 'text y')]
    const before = body(list('note-000000x', x), list('note-000000y', y))
    const mine = body(list('note-000000y', y, list('note-000000x', x)))
    const theirs = body(list('note-000000x', x, list('note-000000y', y)))
    const { document } = merge(before, mine, theirs)
    expect([...textsOf(document)]).toEqual(expect.arrayContaining(['text x', 'text y']))
    expect(GuideDocument.safeParse(document).success).toBe(true)
  })
})
