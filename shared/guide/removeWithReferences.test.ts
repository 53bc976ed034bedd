import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { copyStep } from './copyStep'
import { findNode } from './edit'
import { plainText, wordsOf } from './plainText'
import { readiness } from './readiness'
import { removeWithReferences } from './removeWithReferences'
import { repeatedId } from './repeatedId'
import { GuideDocument } from './schema'
import { stepsOf } from './stepsOf'
import { arbitraryDocument } from './testing/arbitraryDocument'
import { nodesOf } from './testing/arbitraryEdit'
import { countedIds } from './testing/draws'
import { PHOTO, SOLID, soundDocument, soundFacts } from './testing/soundDocument'

const SEED = { seed: 20261201, numRuns: 200 }
const sound = soundDocument()
const rulesOf = (doc: GuideDocument): string[] => readiness(doc, soundFacts()).map(({ rule }) => rule)
const textOf = (doc: GuideDocument): string => plainText(doc.sections[0]!.steps[0]!.body, wordsOf(doc))

test('whatever is removed, nothing is left that points at it, and the document stays valid', () => {
  const kinds = fc.constantFrom(
    'section',
    'step',
    'line',
    'option',
    'tool',
    'figure',
    'model',
    'use',
    'claim',
  )
  fc.assert(
    fc.property(arbitraryDocument, kinds, fc.nat(), (doc, kind, pick) => {
      const ids = nodesOf(doc, kind)
      const id = ids[pick % Math.max(1, ids.length)]
      if (id === undefined) return
      const after = removeWithReferences(doc, kind, id)
      expect(GuideDocument.safeParse(after).error?.issues).toBeUndefined()
      const onlyOption =
        kind === 'option' && doc.lines.some(({ options }) => options.length === 1 && options[0]!.id === id)
      if (onlyOption) expect(after).toBe(doc)
      else expect(JSON.stringify(after)).not.toContain(`"${id}"`)
    }),
    SEED,
  )
})

describe('removing', () => {
  test('a line: its uses and balloons go, its name stays in the text', () => {
    const after = removeWithReferences(sound, 'line', 'line-bolt-001')
    expect(textOf(after)).toBe('Put in the Bolt M8 as in 1.1, then go on with 2')
    expect(findNode(after, 'use', 'use-bolt-0001')).toBeUndefined()
    expect(findNode(after, 'callout', 'callout-bolt1')).toBeUndefined()
    expect(rulesOf(after)).toEqual([])
  })

  test('a step: its title stays in the text, and the figures that only it showed go', () => {
    const after = removeWithReferences(sound, 'step', 'step-wheel-01')
    expect(textOf(after)).toBe('Put in the Bolt M8 as in 1.1, then go on with Fit the wheel')
    expect(after.figures.map(({ id }) => id)).toEqual(['figure-front', 'figure-bolts'])
    expect(after.assets).toBe(sound.assets)
  })

  test('a section: all its steps and their figures', () => {
    const after = removeWithReferences(sound, 'section', 'section-one-1')
    expect(after.figures.map(({ id }) => id)).toEqual(['figure-front'])
  })

  test('a figure: from its step and the front page, and its file where no other has it', () => {
    const withOther = { ...sound, front: 'figure-bolts' }
    const after = removeWithReferences(withOther, 'figure', 'figure-bolts')
    expect(after.front).toBeNull()
    expect(stepsOf(after)[0]!.figures).toEqual([])
    expect(textOf(after)).toBe('Put in the Bolt M8 as in The bolts, then go on with 2')
    expect(after.assets.map(({ sha256 }) => sha256)).toEqual([PHOTO, SOLID])
    const last = ['figure-front', 'figure-wheel'].reduce(
      (doc, id) => removeWithReferences(doc, 'figure', id),
      after,
    )
    expect(last.assets.map(({ sha256 }) => sha256)).toEqual([SOLID])
  })

  test('a model: from its step and its line, with its file', () => {
    const after = removeWithReferences(sound, 'model', 'model-wheel-1')
    expect(rulesOf(after)).toEqual(['printed-no-model'])
    expect(after.assets.map(({ sha256 }) => sha256)).toEqual([PHOTO])
  })

  test('a substitute: what hung on it alone is there always, so that nothing written disappears', () => {
    const when = [{ line: 'line-wheel-01', is: ['option-cast-1'] }]
    const either = [{ line: 'line-wheel-01', is: ['option-cast-1', 'option-wheel'] }]
    const doc = {
      ...sound,
      tools: [{ ...sound.tools[0]!, when }],
      cautions: [{ ...sound.cautions[0]!, when: either }],
    }
    const after = removeWithReferences(doc, 'option', 'option-cast-1')
    expect(after.tools[0]).not.toHaveProperty('when')
    expect(after.cautions[0]!.when).toEqual([{ line: 'line-wheel-01', is: ['option-wheel'] }])
  })

  test('what has nothing to do with it is the same object', () => {
    const after = removeWithReferences(sound, 'tool', 'tool-wrench-1')
    expect(after.sections[0]!.steps[1]).toBe(sound.sections[0]!.steps[1])
    expect(after.sections[0]!.steps[0]!.body).toBe(sound.sections[0]!.steps[0]!.body)
    expect(after.lines).toBe(sound.lines)
    expect(removeWithReferences(sound, 'tool', 'nowhere-00001')).toBe(sound)
  })
})

describe('copying a step', () => {
  test('gives every node within a new id and points the copy at itself', () => {
    const { document, copy } = copyStep(sound, 'step-bolts-01', idsOf())!
    const [original, copied, wheel] = document.sections[0]!.steps
    expect(original).toBe(sound.sections[0]!.steps[0])
    expect(wheel).toBe(sound.sections[0]!.steps[1])
    expect(copied!.id).toBe(copy)
    expect(repeatedId(document)).toBeUndefined()
    expect(copied!.figures).not.toEqual(original!.figures)
    expect(textOf({ ...document, sections: [{ ...document.sections[0]!, steps: [copied!, wheel!] }] })).toBe(
      'Put in the Bolt M8 as in 1.1, then go on with 2',
    )
    expect(copied!.uses[0]!.line).toBe('line-bolt-001')
    expect(copyStep(sound, 'nowhere-00001', idsOf())).toBeUndefined()
  })

  test('of any document is valid, and taking the copy out again gives the document back', () => {
    fc.assert(
      fc.property(arbitraryDocument, (doc) => {
        const { document, copy } = copyStep(doc, stepsOf(doc)[0]!.id, idsOf())!
        expect(GuideDocument.safeParse(document).error?.issues).toBeUndefined()
        expect(repeatedId(document)).toBeUndefined()
        expect(removeWithReferences(document, 'step', copy)).toEqual(doc)
      }),
      SEED,
    )
  })
})

function idsOf(): () => string {
  const next = countedIds('copy')
  return () => next('node')
}
