import { describe, expect, test } from 'vitest'
import type { Understanding } from '../../../shared/api/imports'
import { beginSection, counts, joinToBefore, setPiece } from './changeUnderstanding'

const step = (key: string, minutes: number | null) => ({
  key,
  title: key,
  include: true,
  body: {
    type: 'doc' as const,
    content: [{ type: 'paragraph' as const, attrs: { id: `para-${key}-0000` } }],
  },
  minutes,
  figures: [],
  uses: [],
  cautions: [],
})

const understanding: Understanding = {
  title: '',
  lang: 'en',
  licence: '',
  summary: '',
  sections: [
    {
      key: 's',
      title: 'S',
      from: 'a.md',
      include: true,
      steps: [step('one', 5), step('two', null), step('three', 10)],
    },
  ],
  tables: [],
  lines: [
    {
      key: 'l',
      name: 'Bolt',
      specification: '',
      designation: '',
      kind: 'bought',
      quantity: null,
      asNeeded: false,
      typed: 'some',
      note: '',
      sources: [],
      substitutes: [],
      modelKey: null,
      tableKey: null,
      include: true,
    },
  ],
  models: [],
  tools: [],
  unused: [],
  choices: [],
}
const keysOf = (value: Understanding): string[][] =>
  value.sections.map(({ steps }) => steps.map(({ key }) => key))

describe('changes to what was understood', () => {
  test('a piece is changed by its key, the rest stays', () => {
    const changed = setPiece('two', { include: false })(understanding)
    expect(changed.sections[0]!.steps.map(({ include }) => include)).toEqual([true, false, true])
    expect(setPiece('two', { include: true })(changed)).toEqual(understanding)
  })

  test('a joined step loses no text and adds its time; the first has nothing before it', () => {
    const joined = joinToBefore('three')(understanding)
    expect(keysOf(joined)).toEqual([['one', 'two']])
    expect(joined.sections[0]!.steps[1]!.body.content).toHaveLength(2)
    expect(joined.sections[0]!.steps[1]!.minutes).toBe(10)
    expect(joinToBefore('one')(understanding)).toEqual(understanding)
  })

  test('a section begun with a step takes it and what follows', () => {
    expect(keysOf(beginSection('two')(understanding))).toEqual([['one'], ['two', 'three']])
    expect(keysOf(beginSection('one')(understanding))).toEqual([['one', 'two', 'three']])
  })

  test('a line whose quantity was not read is counted as such', () => {
    expect(counts(understanding)).toMatchObject({ steps: 3, lines: 1, noQuantity: 1 })
    expect(counts(setPiece('l', { asNeeded: true })(understanding)).noQuantity).toBe(0)
  })
})
