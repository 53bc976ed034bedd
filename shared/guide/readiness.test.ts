import fc from 'fast-check'
import i18next from 'i18next'
import { describe, expect, test } from 'vitest'
import arabic from '../../src/locales/ar/readiness.json'
import english from '../../src/locales/en/readiness.json'
import { removeNode, setNode } from './edit'
import type { Facts } from './facts'
import type { Finding } from './finding'
import { mend } from './mend'
import { readiness, rulesInOrder, RULES, type RuleName } from './readiness'
import type { Condition, GuideDocument, Inline, Step } from './schema'
import { arbitraryDocument } from './testing/arbitraryDocument'
import { PHOTO, SOLID, soundDocument, soundFacts } from './testing/soundDocument'

const sound = soundDocument()
const [bolts, wheel] = sound.sections[0]!.steps as [Step, Step]
const withCast: Condition = [{ line: 'line-wheel-01', is: ['option-cast-1'] }]
const withPrinted: Condition = [{ line: 'line-wheel-01', is: ['option-wheel'] }]
const nowhere = 'nowhere-00001'

interface Case {
  doc: GuideDocument
  facts?: Facts
  /** Some of the finding that is expected. */
  finds: { place: Partial<Finding['place']>; values?: Finding['values'] }
}

const doc = (fields: Partial<GuideDocument>): Case['doc'] => ({ ...sound, ...fields })
const inBolts = (fields: Partial<Step>): Case['doc'] => setNode(sound, 'step', bolts.id, fields)
const said = (inline: Inline): Step['body'] => ({
  type: 'doc',
  content: [{ type: 'paragraph', attrs: { id: 'paragraph-001' }, content: [inline] }],
})
const boltLine = (fields: Partial<GuideDocument['lines'][number]>): Case['doc'] =>
  setNode(sound, 'line', 'line-bolt-001', fields)
const boltUse = (fields: Partial<Step['uses'][number]>): Case['doc'] =>
  setNode(sound, 'use', 'use-bolt-0001', fields)
const boltFigure = (fields: Partial<GuideDocument['figures'][number]>): Case['doc'] =>
  setNode(sound, 'figure', 'figure-bolts', fields)
const gap = (atLeast: string | null, atMost: string | null, oneSided = false): Case['doc'] =>
  setNode(sound, 'check', 'check-gap-001', { measure: { unit: 'mm', atLeast, atMost, oneSided } })

const onBolts = { page: 'step', step: bolts.id } as const
const ofBolt = { page: 'parts', node: 'line-bolt-001' } as const
const bolt = { line: 1, name: 'Bolt M8' }

/** For each rule, the sound document with one thing broken. */
const CASES: Record<RuleName, Case> = {
  'title-missing': { doc: doc({ title: ' ' }), finds: { place: { page: 'guide', field: 'title' } } },
  'summary-missing': { doc: doc({ summary: '' }), finds: { place: { page: 'guide', field: 'summary' } } },
  'licence-missing': { doc: doc({ licence: '' }), finds: { place: { page: 'guide', field: 'licence' } } },
  'licence-unknown': {
    doc: doc({ licence: 'mine' }),
    finds: { place: { field: 'licence' }, values: { licence: 'mine' } },
  },
  'step-none': { doc: doc({ sections: [] }), finds: { place: { page: 'guide' } } },
  'language-differs': {
    doc: doc({
      summary:
        'حامل عجلة يمكن تدويرها باليد، مصنوع من الصلب ومن قطعة مطبوعة واحدة، وكل ما فيه متوفر في كل ورشة، ولا يحتاج إلى لحام',
    }),
    finds: { place: { page: 'guide', field: 'lang' }, values: { lang: 'en' } },
  },
  'front-figure-missing': { doc: doc({ front: null }), finds: { place: { page: 'guide', field: 'front' } } },
  'tool-none': { doc: doc({ tools: [] }), finds: { place: { ...onBolts, field: 'tools' } } },
  'caution-none': {
    doc: { ...inBolts({ cautions: [] }), cautions: [] },
    finds: { place: { page: 'guide', field: 'cautions' } },
  },
  'claim-unproved': {
    doc: setNode(sound, 'claim', 'claim-power-1', { evidence: { kind: 'none' } }),
    finds: { place: { page: 'guide', node: 'claim-power-1' }, values: { label: 'Power' } },
  },
  'step-untitled': {
    doc: inBolts({ title: '' }),
    finds: { place: { ...onBolts, field: 'title' }, values: { step: 1 } },
  },
  'step-empty': {
    doc: inBolts({ body: { type: 'doc', content: [] }, checks: [], figures: [] }),
    finds: { place: { ...onBolts, field: 'body' }, values: { step: 1 } },
  },
  'section-untitled': {
    doc: setNode(sound, 'section', 'section-one-1', { title: '' }),
    finds: { place: { node: 'section-one-1' }, values: { section: 'A' } },
  },
  'section-empty': {
    doc: doc({ sections: [...sound.sections, { id: 'section-two-2', title: 'End', steps: [] }] }),
    finds: { place: { node: 'section-two-2' }, values: { section: 'B', title: 'End' } },
  },
  'step-no-minutes': { doc: inBolts({ minutes: null }), finds: { place: { ...onBolts, field: 'minutes' } } },
  'step-no-figure': { doc: inBolts({ figures: [] }), finds: { place: { ...onBolts, field: 'figures' } } },
  'line-more-used': {
    doc: boltUse({ quantity: { value: '12', unit: 'each' } }),
    finds: { place: { ...ofBolt, field: 'quantity' }, values: { ...bolt, used: '12', listed: '8' } },
  },
  'line-more-listed': {
    doc: boltLine({ quantity: { value: '9', unit: 'each' } }),
    finds: { place: ofBolt, values: { ...bolt, used: '8', listed: '9' } },
  },
  'line-units-differ': {
    doc: boltLine({ quantity: { value: '1', unit: 'pack' } }),
    finds: { place: ofBolt, values: bolt },
  },
  'line-no-quantity': {
    doc: boltLine({ quantity: null }),
    finds: { place: ofBolt, values: { ...bolt, used: '8' } },
  },
  'line-unused': { doc: removeNode(sound, 'use', 'use-bolt-0001'), finds: { place: ofBolt, values: bolt } },
  'line-uncounted': {
    doc: boltUse({ quantity: null }),
    finds: { place: ofBolt, values: { ...bolt, listed: '8' } },
  },
  'part-unnamed': {
    doc: setNode(sound, 'option', 'line-bolt-001-option', {
      part: { key: '', name: '', specification: 'M8' },
    }),
    finds: { place: { ...ofBolt, field: 'name' }, values: { line: 1, name: '…' } },
  },
  'line-no-specification': {
    doc: setNode(sound, 'option', 'line-bolt-001-option', {
      part: { key: '', name: 'Bolt M8', specification: '' },
    }),
    finds: { place: { ...ofBolt, field: 'specification' }, values: bolt },
  },
  'printed-no-model': {
    doc: boltLine({ kind: 'printed' }),
    finds: { place: { ...ofBolt, field: 'model' }, values: bolt },
  },
  'use-not-listed': {
    doc: inBolts({ uses: [...bolts.uses, { id: 'use-nothing-1', line: nowhere, quantity: null }] }),
    finds: { place: { ...onBolts, node: 'use-nothing-1' }, values: { step: 1 } },
  },
  'text-reference-gone': {
    doc: inBolts({ body: said({ type: 'balloon', attrs: { line: nowhere } }) }),
    finds: { place: { ...onBolts, field: 'body' }, values: { step: 1, context: 'line' } },
  },
  'callout-gone': {
    doc: boltFigure({
      callouts: [{ id: 'callout-none1', shape: 'balloon', line: nowhere, at: { x: 1, y: 1 }, tip: null }],
    }),
    finds: { place: { ...onBolts, node: 'callout-none1' }, values: { figure: '1.1' } },
  },
  'figure-gone': {
    doc: inBolts({ figures: ['figure-bolts', nowhere] }),
    finds: { place: { ...onBolts, field: 'figures' } },
  },
  'tool-gone': { doc: inBolts({ tools: [nowhere] }), finds: { place: { ...onBolts, field: 'tools' } } },
  'model-gone': { doc: inBolts({ models: [nowhere] }), finds: { place: { ...onBolts, field: 'models' } } },
  'front-figure-gone': { doc: doc({ front: nowhere }), finds: { place: { page: 'guide', field: 'front' } } },
  'printed-model-gone': {
    doc: doc({ models: [] }),
    finds: { place: { page: 'parts', node: 'line-wheel-01' }, values: { line: 2, name: 'Wheel' } },
  },
  'within-gone': {
    doc: boltLine({ within: nowhere }),
    finds: { place: { ...ofBolt, field: 'within' }, values: bolt },
  },
  'within-circle': {
    doc: setNode(boltLine({ within: 'line-wheel-01' }), 'line', 'line-wheel-01', { within: 'line-bolt-001' }),
    finds: { place: ofBolt, values: bolt },
  },
  'condition-gone': {
    doc: boltLine({ when: [{ line: 'line-wheel-01', is: [nowhere] }] }),
    finds: { place: { ...ofBolt, field: 'when' }, values: { ...bolt, context: 'line' } },
  },
  'use-absent': {
    doc: boltLine({ when: withCast }),
    finds: { place: { ...onBolts, node: 'use-bolt-0001' }, values: { step: 1, ...bolt, with: 'Wheel' } },
  },
  'text-absent': {
    doc: boltLine({ when: withPrinted }),
    finds: { place: { ...onBolts, field: 'body' }, values: { step: 1, ...bolt, with: 'Cast wheel' } },
  },
  'figure-no-picture': {
    doc: boltFigure({ asset: null }),
    finds: { place: { ...onBolts, node: 'figure-bolts' }, values: { figure: '1.1' } },
  },
  'figure-no-alt': { doc: boltFigure({ alt: '' }), finds: { place: { node: 'figure-bolts', field: 'alt' } } },
  'figure-no-caption': {
    doc: boltFigure({ caption: '' }),
    finds: { place: { node: 'figure-bolts', field: 'caption' } },
  },
  'callout-not-placed': {
    doc: setNode(sound, 'callout', 'callout-bolt1', { at: null }),
    finds: { place: { ...onBolts, node: 'callout-bolt1' }, values: { figure: '1.1', callout: 1 } },
  },
  'file-missing': {
    doc: sound,
    facts: { files: new Map([...soundFacts().files].filter(([sha]) => sha !== SOLID)) },
    finds: { place: { ...onBolts, node: 'model-wheel-1' }, values: { file: 'wheel.stl' } },
  },
  'file-failed': {
    doc: boltFigure({ asset: SOLID }),
    facts: soundFacts({ solid: { state: 'failed', trouble: 'It is cut off.' } }),
    finds: {
      place: { ...onBolts, node: 'figure-bolts' },
      values: { file: 'wheel.stl', trouble: 'It is cut off.', context: 'why' },
    },
  },
  'file-working': {
    doc: boltFigure({ asset: SOLID }),
    facts: soundFacts({ solid: { state: 'working' } }),
    finds: { place: { ...onBolts, node: 'figure-bolts' }, values: { file: 'wheel.stl' } },
  },
  'model-no-line': {
    doc: setNode(sound, 'option', 'option-wheel', { print: undefined }),
    finds: { place: { ...onBolts, node: 'model-wheel-1' }, values: { model: 'Wheel' } },
  },
  'model-defects': {
    doc: sound,
    facts: soundFacts({
      solid: {
        model: { closed: false, openEdges: 3, backwardsEdges: 2, nonManifoldEdges: 1, degenerateFacets: 4 },
      },
    }),
    finds: {
      place: { ...onBolts, node: 'model-wheel-1' },
      values: { model: 'Wheel', open: 3, backwards: 2, shared: 1, degenerate: 4 },
    },
  },
  'check-empty': {
    doc: setNode(sound, 'check', 'check-gap-001', { text: '' }),
    finds: { place: { ...onBolts, node: 'check-gap-001', field: 'text' }, values: { check: '1.1' } },
  },
  'check-no-limits': {
    doc: gap(null, null, true),
    finds: { place: { node: 'check-gap-001' }, values: { check: '1.1' } },
  },
  'check-no-lower': { doc: gap(null, '1.2'), finds: { place: { node: 'check-gap-001', field: 'atLeast' } } },
  'check-no-upper': { doc: gap('0.8', null), finds: { place: { node: 'check-gap-001', field: 'atMost' } } },
  // As numbers: as text, "10" comes before "9".
  'check-reversed': {
    doc: gap('10', '9'),
    finds: { place: { node: 'check-gap-001' }, values: { least: '10', most: '9' } },
  },
  'caution-no-hazard': {
    doc: setNode(sound, 'caution', 'caution-guide', { hazard: '' }),
    finds: { place: { page: 'guide', node: 'caution-guide', field: 'hazard' }, values: { context: 'guide' } },
  },
  'caution-no-avoid': {
    doc: setNode(sound, 'caution', 'caution-step-1', { avoid: '' }),
    finds: { place: { ...onBolts, node: 'caution-step-1', field: 'avoid' }, values: { step: 1 } },
  },
}

const rules = Object.keys(CASES) as RuleName[]

test('nothing is found in a sound guide', () => {
  expect(readiness(sound, soundFacts())).toEqual([])
})

describe.each(rules)('%s', (rule) => {
  const { doc: broken, facts = soundFacts(), finds } = CASES[rule]
  const found = readiness(broken, facts)

  test('is found, at its place and with its values', () => {
    const own = found.filter((finding) => finding.rule === rule)
    expect(own.length).toBeGreaterThan(0)
    expect(own[0]).toMatchObject({ ...finds, must: RULES[rule].must })
  })

  test('is not counted as in order then, and is where it is not broken', () => {
    expect(rulesInOrder(broken, facts, found)).not.toContain(rule)
    const inOrder = rulesInOrder(sound, soundFacts(), [])
    // The sound guide has no condition, so nothing is to be said of choices.
    expect(inOrder.includes(rule)).toBe(rule !== 'use-absent' && rule !== 'text-absent')
  })

  test.each(['en', 'ar'])('has its sentence in %s, with every value filled in', (language) => {
    const t = sentences(language)
    for (const finding of found) {
      const sentence = t(finding.rule, finding.values)
      expect(sentence).not.toMatch(/\{\{|\$t|undefined|counted|^[a-z-]+$/)
      expect(t(`inOrder.${finding.rule}`)).not.toContain('inOrder')
      if (mend(broken, finding) !== undefined)
        expect(t(`mend.${finding.rule}`, finding.values)).not.toMatch(/mend\.|\{\{|\$t/)
    }
  })
})

const i18n = i18next.createInstance()
await i18n.init({
  lng: 'en',
  resources: { en: { readiness: english }, ar: { readiness: arabic } },
  interpolation: { escapeValue: false },
})
const sentences = (language: string) => {
  const t = i18n.getFixedT(language, 'readiness')
  return (rule: string, values: Finding['values'] = {}): string => t(rule, values)
}

test('both languages have the same sentences with the same values in them', () => {
  const flat = (part: object, before = ''): Record<string, string[]> =>
    Object.fromEntries(
      Object.entries(part).flatMap(([key, value]: [string, unknown]) =>
        typeof value === 'string'
          ? [[before + key, [...value.matchAll(/\{\{(\w+)\}\}/g)].map((match) => match[1]!).sort()]]
          : Object.entries(flat(value as object, `${before}${key}.`)),
      ),
    )
  expect(flat(arabic)).toEqual(flat(english))
})

test('the sentences of the mock-up', () => {
  const t = sentences('en')
  const one = (rule: RuleName): Finding =>
    readiness(CASES[rule].doc, CASES[rule].facts ?? soundFacts()).find((finding) => finding.rule === rule)!
  expect(t('line-more-used', one('line-more-used').values)).toBe(
    'Bolt M8 1: the steps use 12, the parts list has 8.',
  )
  expect(t('mend.line-more-used', one('line-more-used').values)).toBe('List 12')
  expect(t('callout-not-placed', one('callout-not-placed').values)).toBe(
    'Figure 1.1: callout 1 is not placed.',
  )
  expect(t('check-no-upper', one('check-no-upper').values)).toContain('Check 1.1 has no upper limit.')
})

test('units are said: a symbol, or the word of what is counted', () => {
  const t = sentences('en')
  const first = (document: GuideDocument): string => {
    const finding = readiness(document, soundFacts())[0]!
    return t(finding.rule, finding.values)
  }
  const inUnit = (unit: 'mm' | 'pair'): GuideDocument =>
    setNode(boltLine({ quantity: { value: '8', unit } }), 'use', 'use-bolt-0001', {
      quantity: { value: '9', unit },
    })
  expect(first(inUnit('mm'))).toBe('Bolt M8 1: the steps use 9\u00a0mm, the parts list has 8\u00a0mm.')
  expect(first(inUnit('pair'))).toBe('Bolt M8 1: the steps use 9 pairs, the parts list has 8 pairs.')
})

test('the list must add up for every choice, and the choice is named', () => {
  const twice = setNode(sound, 'step', wheel.id, {
    uses: [
      ...wheel.uses,
      { id: 'use-bolt-cast', line: 'line-bolt-001', quantity: { value: '4', unit: 'each' }, when: withCast },
    ],
  })
  const [finding, ...others] = readiness(twice, soundFacts())
  expect(others).toEqual([])
  expect(finding).toMatchObject({
    rule: 'line-more-used',
    values: { used: '12', listed: '8', with: 'Cast wheel', context: 'with' },
  })
  expect(sentences('en')('line-more-used', finding!.values)).toBe(
    'Bolt M8 1, with Cast wheel: the steps use 12, the parts list has 8.',
  )
  // One quantity cannot be right for both choices, so no press can mend it.
  expect(mend(twice, finding!)).toBeUndefined()
})

test('a line that is there only with a substitute is mended by one press, since all its choices agree', () => {
  const conditional = setNode(setNode(sound, 'step', bolts.id, { when: withCast }), 'line', 'line-bolt-001', {
    when: withCast,
    quantity: { value: '5', unit: 'each' },
  })
  const [finding] = readiness(conditional, soundFacts())
  expect(finding).toMatchObject({ rule: 'line-more-used', values: { context: 'with', with: 'Cast wheel' } })
  const mended = mend(conditional, finding!)!
  expect(mended.lines[0]!.quantity).toEqual({ value: '8', unit: 'each' })
})

test('a part under a condition may be used by a step under the same one', () => {
  const both = setNode(inBolts({ when: withCast }), 'line', 'line-bolt-001', { when: withCast })
  expect(readiness(both, soundFacts()).map(({ rule }) => rule)).toEqual([])
})

test('limits that are meant to be one-sided are in order', () => {
  expect(readiness(gap('0.8', null, true), soundFacts())).toEqual([])
})

test('figures that no reader sees are not judged', () => {
  const hidden = { ...sound.figures[0]!, id: 'figure-hidden', asset: null, alt: '', caption: '' }
  expect(readiness(doc({ figures: [...sound.figures, hidden] }), soundFacts())).toEqual([])
})

test.each(rules.filter((rule) => findingIn(rule) !== undefined))('%s: mending it makes it vanish', (rule) => {
  const { doc: broken, facts = soundFacts() } = CASES[rule]
  const mended = mend(broken, findingIn(rule)!)!
  expect(readiness(mended, facts).map((finding) => finding.rule)).not.toContain(rule)
})

function findingIn(rule: RuleName): Finding | undefined {
  const { doc: broken, facts = soundFacts() } = CASES[rule]
  return readiness(broken, facts).find(
    (finding) => finding.rule === rule && mend(broken, finding) !== undefined,
  )
}

test('which rules one press can mend', () => {
  expect(rules.filter((rule) => findingIn(rule) !== undefined)).toEqual(
    Object.keys(english.mend).sort((a, b) => rules.indexOf(a as RuleName) - rules.indexOf(b as RuleName)),
  )
})

test('arbitrary documents are judged without an error, and no reference of theirs is found to lead nowhere', () => {
  fc.assert(
    fc.property(arbitraryDocument, (document) => {
      const found = readiness(document, { files: new Map() })
      expect(
        found.map(({ rule }) => rule).filter((rule) => rule.endsWith('-gone') || rule === 'use-not-listed'),
      ).toEqual([])
      expect(found.findLastIndex(({ must }) => must)).toBeLessThanOrEqual(
        found.filter(({ must }) => must).length - 1,
      )
    }),
    { seed: 20261201, numRuns: 100 },
  )
})

test('a picture shown by nobody may be missing from the site; a shown one may not', () => {
  const noPhoto: Facts = { files: new Map([...soundFacts().files].filter(([sha]) => sha !== PHOTO)) }
  expect(readiness(sound, noPhoto).map(({ rule }) => rule)).toEqual([
    'file-missing',
    'file-missing',
    'file-missing',
  ])
})
