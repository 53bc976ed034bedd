import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { emptyDocument, emptyStep } from '../../../../shared/guide/emptyDocument'
import type { GuideDocument, Step } from '../../../../shared/guide/schema'
import { stepsOf } from '../../../../shared/guide/stepsOf'
import { drop, nudgeSection, nudgeStep } from './moveInOutline'

let counter = 0
const newId = () => `node${String((counter += 1)).padStart(10, '0')}`
const named = (name: string) => `${name}${'-'.repeat(12 - name.length)}`

/** "ab|c|" is a guide of three sections: a and b in the first, c in the second, none in the third. */
function outline(text: string): GuideDocument {
  counter = 0
  const sections = text.split('|').map((steps, index) => ({
    id: named(`S${index}`),
    title: '',
    steps: [...steps].map((letter): Step => ({ ...emptyStep(newId), id: named(letter) })),
  }))
  return { ...emptyDocument(newId, { lang: 'en', title: 'Pump' }), sections }
}
const read = (document: GuideDocument): string =>
  document.sections.map((section) => section.steps.map((step) => step.id[0]).join('')).join('|')

describe('moving in the outline', () => {
  test.each([
    ['ab|c', 'b', -1, 'ba|c'],
    ['ab|c', 'a', -1, 'ab|c'],
    ['ab|c', 'b', 1, 'a|bc'],
    ['ab|c', 'c', -1, 'abc|'],
    ['ab|c', 'c', 1, 'ab|c'],
    ['a||c', 'c', -1, 'a|c|'],
  ] as const)('%s: %s by %i gives %s', (from, step, by, to) => {
    expect(read(nudgeStep(outline(from), named(step), by))).toBe(to)
  })

  test.each([
    ['abc|d', 'a', 'c', false, 'bca|d'],
    ['abc|d', 'a', 'c', true, 'bac|d'],
    ['abc|d', 'c', 'a', true, 'cab|d'],
    ['abc|d', 'a', 'd', true, 'bc|ad'],
    ['abc|d', 'd', 'b', false, 'abdc|'],
  ] as const)('%s: %s dropped on %s (before: %s) gives %s', (from, step, on, before, to) => {
    const moved = drop(outline(from), {
      kind: 'step',
      id: named(step),
      on: { kind: 'step', id: named(on) },
      before,
    })
    expect(read(moved)).toBe(to)
  })

  test.each([
    ['ab|c', 'a', 'S1', false, 'b|ac'],
    ['ab|c', 'c', 'S1', true, 'abc|'],
    ['ab|c', 'c', 'S0', true, 'cab|'],
    ['ab|', 'a', 'S1', false, 'b|a'],
  ] as const)('%s: %s dropped on the heading %s (upper half: %s) gives %s', (from, step, on, before, to) => {
    const moved = drop(outline(from), {
      kind: 'step',
      id: named(step),
      on: { kind: 'section', id: named(on) },
      before,
    })
    expect(read(moved)).toBe(to)
  })

  test('sections move whole', () => {
    expect(read(nudgeSection(outline('a|b|c'), named('S0'), 1))).toBe('b|a|c')
    const on = { kind: 'step' as const, id: named('c') }
    expect(read(drop(outline('a|b|c'), { kind: 'section', id: named('S0'), on, before: true }))).toBe('b|c|a')
    expect(
      read(
        drop(outline('a|b|c'), {
          kind: 'section',
          id: named('S2'),
          on: { kind: 'step', id: named('a') },
          before: false,
        }),
      ),
    ).toBe('c|a|b')
  })

  test('no drop loses or doubles a step', () => {
    const letters = [...'abcdef']
    const target = fc.oneof(
      fc.constantFrom(...letters).map((letter) => ({ kind: 'step' as const, id: named(letter) })),
      fc.constantFrom('S0', 'S1', 'S2').map((name) => ({ kind: 'section' as const, id: named(name) })),
    )
    fc.assert(
      fc.property(target, target, fc.boolean(), (what, on, before) => {
        const moved = drop(outline('abc|de|f'), { kind: what.kind, id: what.id, on, before })
        expect(
          stepsOf(moved)
            .map((step) => step.id[0])
            .sort(),
        ).toEqual(letters)
        expect(moved.sections).toHaveLength(3)
      }),
      { seed: 20261201 },
    )
  })
})
