import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { hashOf } from '../lib/json/hash'
import { choicesFor, choicesWithout } from './choices'
import { setNode } from './edit'
import { holds, type Choices } from './holds'
import { numbering } from './numbering'
import { inlinesOf, plainText, wordsOf } from './plainText'
import { reconcile, takeFromSteps } from './reconcile'
import { resolve, targetsOf } from './resolve'
import { GuideDocument, type Block, type Condition, type Line } from './schema'
import { stepsOf } from './stepsOf'
import { arbitraryDocument } from './testing/arbitraryDocument'
import { arbitraryDraws } from './testing/draws'
import { soundDocument } from './testing/soundDocument'
import { targetOf, withoutReferences } from './withoutReferences'

const SEED = { seed: 20261201, numRuns: 200 }

/** A document with a set of choices, some of them left to the designer. */
const arbitraryChoice = fc.tuple(arbitraryDocument, arbitraryDraws(20)).map(([doc, draws]) => ({
  doc,
  choices: Object.fromEntries(
    draws.some(doc.lines).map((line) => [line.id, draws.of(line.options).id]),
  ) as Choices,
}))

/** Every id that some node of the document points at, with what it should be. */
function referencesOf(doc: GuideDocument): { kind: keyof ReturnType<typeof targetsOf>; id: string }[] {
  const conditions: Condition[] = []
  const collect = (value: unknown): void => {
    if (typeof value !== 'object' || value === null) return
    if ('when' in value && Array.isArray(value.when)) conditions.push(value.when as Condition)
    Object.values(value).forEach(collect)
  }
  collect(doc)
  return [
    ...conditions
      .flat()
      .flatMap(({ line, is }) => [
        { kind: 'line' as const, id: line },
        ...is.map((id) => ({ kind: 'option' as const, id })),
      ]),
    ...stepsOf(doc).flatMap((step) => [
      ...step.uses.map(({ line }) => ({ kind: 'line' as const, id: line })),
      ...step.tools.map((id) => ({ kind: 'tool' as const, id })),
      ...step.figures.map((id) => ({ kind: 'figure' as const, id })),
      ...step.models.map((id) => ({ kind: 'model' as const, id })),
      ...inlinesOf(step.body).flatMap((inline) => {
        const target = targetOf(inline)
        return target === undefined ? [] : [{ kind: target.target, id: target.id }]
      }),
    ]),
    ...doc.figures.flatMap(({ callouts }) =>
      callouts.flatMap((callout) =>
        callout.shape === 'balloon' ? [{ kind: 'line' as const, id: callout.line }] : [],
      ),
    ),
    ...doc.lines.flatMap(({ within, options }) => [
      ...(within === undefined ? [] : [{ kind: 'line' as const, id: within }]),
      ...options.flatMap(({ print }) =>
        typeof print?.model === 'string' ? [{ kind: 'model' as const, id: print.model }] : [],
      ),
    ]),
    ...(doc.front === null ? [] : [{ kind: 'figure' as const, id: doc.front }]),
  ]
}

function expectNothingDangles(doc: GuideDocument): void {
  const targets = targetsOf(doc)
  expect(referencesOf(doc).filter(({ kind, id }) => !targets[kind].has(id))).toEqual([])
}

describe('resolve', () => {
  test('gives a valid document in which nothing points at what is absent, and again gives the same', () => {
    fc.assert(
      fc.property(arbitraryChoice, ({ doc, choices }) => {
        expectNothingDangles(doc)
        const resolved = resolve(doc, choices)
        expect(GuideDocument.safeParse(resolved).error?.issues).toBeUndefined()
        expectNothingDangles(resolved)
        expect(resolved.lines.every(({ options }) => options.length === 1)).toBe(true)
        expect(resolved.sections.every(({ steps }) => steps.length > 0)).toBe(true)
        expect(hashOf(resolve(resolved))).toBe(hashOf(resolved))
      }),
      SEED,
    )
  })

  test('numbers skip none: sections, steps, balloons, figures and checks count up by one', () => {
    fc.assert(
      fc.property(arbitraryChoice, ({ doc, choices }) => {
        const resolved = resolve(doc, choices)
        const numbers = numbering(resolved)
        expect(resolved.sections.map(({ id }) => numbers.section[id])).toEqual(
          [...'ABCDEFGH'].slice(0, resolved.sections.length),
        )
        expect(stepsOf(resolved).map(({ id }) => numbers.step[id])).toEqual(
          stepsOf(resolved).map((_, index) => index + 1),
        )
        expect(resolved.lines.map(({ id }) => numbers.line[id])).toEqual(
          resolved.lines.map((_, index) => index + 1),
        )
        for (const step of stepsOf(resolved)) {
          const own = Object.values(numbers.figure).filter((number) =>
            number.startsWith(`${numbers.step[step.id]}.`),
          )
          expect(own.sort()).toEqual(own.map((_, index) => `${numbers.step[step.id]}.${index + 1}`))
          expect(step.checks.map(({ id }) => numbers.check[id])).toEqual(
            step.checks.map((_, index) => `${numbers.step[step.id]}.${index + 1}`),
          )
        }
      }),
      SEED,
    )
  })

  const sound = soundDocument()
  const cast: Condition = [{ line: 'line-wheel-01', is: ['option-cast-1'] }]
  const withCast = { 'line-wheel-01': 'option-cast-1' }

  test('a balloon of an absent line becomes the name of its part, a reference to an absent step its title', () => {
    const doc = setNode(setNode(sound, 'line', 'line-bolt-001', { when: cast }), 'step', 'step-wheel-01', {
      when: cast,
    })
    const resolved = resolve(doc)
    expect(plainText(resolved.sections[0]!.steps[0]!.body, wordsOf(resolved))).toBe(
      'Put in the Bolt M8 as in 1.1, then go on with Fit the wheel',
    )
    expect(inlinesOf(resolve(doc, withCast).sections[0]!.steps[0]!.body)).toEqual(
      inlinesOf(sound.sections[0]!.steps[0]!.body),
    )
  })

  test('a list of which no item is there is left out, with what holds nothing else', () => {
    const list: Block = {
      type: 'note',
      attrs: { id: 'note-0000001' },
      content: [
        {
          type: 'bulletList',
          attrs: { id: 'list-0000001' },
          content: [
            {
              type: 'listItem',
              attrs: { id: 'item-0000001', when: cast },
              content: [{ type: 'paragraph', attrs: { id: 'paragraph-in' } }],
            },
          ],
        },
      ],
    }
    const doc = setNode(sound, 'step', 'step-wheel-01', { body: { type: 'doc', content: [list] } })
    expect(resolve(doc).sections[0]!.steps[1]!.body.content).toEqual([])
    expect(resolve(doc, withCast).sections[0]!.steps[1]!.body.content).toHaveLength(1)
  })

  test('steps that exclude each other share a number, which is one step for whoever has chosen', () => {
    const [bolts, wheel] = sound.sections[0]!.steps
    const printed: Condition = [{ line: 'line-wheel-01', is: ['option-wheel'] }]
    const steps = [
      bolts!,
      { ...wheel!, when: printed },
      { ...wheel!, id: 'step-cast-001', when: cast },
      { ...bolts!, id: 'step-last-001' },
    ]
    const doc = { ...sound, sections: [{ ...sound.sections[0]!, steps }] }
    const numbers = numbering(doc)
    expect(steps.map(({ id }) => numbers.step[id])).toEqual([1, 2, 2, 3])
    expect(numbers.steps).toBe(3)
  })
})

describe('conditions', () => {
  const lineOf = (id: string, when?: Condition): Line => ({
    ...soundDocument().lines[0]!,
    id,
    ...(when === undefined ? {} : { when }),
    options: ['first', 'other'].map((name) => ({
      ...soundDocument().lines[0]!.options[0]!,
      id: `${id}-${name}`,
    })),
  })
  const only = (line: string, option: string): Condition => [{ line, is: [`${line}-${option}`] }]

  test('a line under a condition that does not hold has no option chosen', () => {
    const doc = {
      ...soundDocument(),
      lines: [lineOf('generator'), lineOf('bracket', only('generator', 'other'))],
    }
    expect(holds(doc, {}, only('bracket', 'first'))).toBe(false)
    expect(holds(doc, { generator: 'generator-other' }, only('bracket', 'first'))).toBe(true)
    expect(holds(doc, { generator: 'generator-other', bracket: 'unknown' }, only('bracket', 'first'))).toBe(
      true,
    )
  })

  test('lines whose conditions lead in a circle are absent, and asking ends', () => {
    const doc = {
      ...soundDocument(),
      lines: [lineOf('one', only('two', 'first')), lineOf('two', only('one', 'first'))],
    }
    expect(holds(doc, {}, only('one', 'first'))).toBe(false)
  })

  test('only choices that make a difference are gone through, those that they hang on included', () => {
    const doc = {
      ...soundDocument(),
      lines: [lineOf('generator'), lineOf('bracket', only('generator', 'other')), lineOf('far')],
    }
    expect(choicesFor(doc, [undefined])).toEqual([{}])
    expect(choicesFor(doc, [only('bracket', 'first')])).toHaveLength(4)
    expect(choicesWithout(doc, [undefined], only('bracket', 'first'))).toEqual({
      bracket: 'bracket-first',
      generator: 'generator-first',
    })
    expect(choicesWithout(doc, [only('bracket', 'first')], only('generator', 'other'))).toBeUndefined()
  })
})

describe('reconcile', () => {
  test('counts as the resolved guide does, line by line', () => {
    fc.assert(
      fc.property(arbitraryChoice, ({ doc, choices }) => {
        expect(reconcile(doc, choices).lines).toEqual(reconcile(resolve(doc, choices)).lines)
      }),
      SEED,
    )
  })

  test('what is taken from the steps makes the line even, or there was nothing to take', () => {
    fc.assert(
      fc.property(arbitraryChoice, ({ doc, choices }) => {
        for (const { id } of doc.lines) {
          const before = reconcile(doc, choices).lines.find(({ line }) => line === id)
          const taken = takeFromSteps(doc, id, choices)
          const after = reconcile(taken, choices).lines.find(({ line }) => line === id)
          if (taken !== doc) expect(after?.balance).toBe('even')
          else if (before !== undefined)
            expect(before.balance).toMatch(/^(even|unused|as needed|units differ)$/)
        }
      }),
      SEED,
    )
  })

  test('sums are exact: a tenth three times is 0.3, and 1.5 m is 1500 mm', () => {
    const sound = soundDocument()
    const step = sound.sections[0]!.steps[0]!
    const use = (id: string, value: string, unit: 'm' | 'mm') => ({
      id,
      line: 'line-bolt-001',
      quantity: { value, unit },
    })
    const doc = setNode(
      setNode(sound, 'line', 'line-bolt-001', { quantity: { value: '0.3', unit: 'm' } }),
      'step',
      step.id,
      {
        uses: [
          use('use-00000001', '0.1', 'm'),
          use('use-00000002', '100', 'mm'),
          use('use-00000003', '0.1', 'm'),
        ],
      },
    )
    expect(reconcile(doc).lines[0]).toMatchObject({
      balance: 'even',
      used: { value: '0.3', unit: 'm' },
      steps: [step.id],
    })
  })

  test('a use of a line that is not listed is named', () => {
    const sound = soundDocument()
    const doc = setNode(sound, 'use', 'use-bolt-0001', { line: 'nowhere-00001' })
    expect(reconcile(doc).unlisted).toEqual([
      { step: 'step-bolts-01', use: 'use-bolt-0001', line: 'nowhere-00001' },
    ])
  })
})

test('without references to what is gone, nothing dangles; without any gone, the very same document', () => {
  fc.assert(
    fc.property(arbitraryDocument, arbitraryDraws(30), (doc, draws) => {
      expect(withoutReferences(doc, { isGone: () => false, word: () => '' })).toBe(doc)
      const gone = new Set(draws.some(doc.lines).map(({ id }) => id))
      const left = { ...doc, lines: doc.lines.filter(({ id }) => !gone.has(id)) }
      const targets = targetsOf(left)
      const clean = withoutReferences(left, {
        isGone: (target, id) => !targets[target].has(id),
        word: () => 'x',
      })
      expectNothingDangles(clean)
      expect(GuideDocument.safeParse(clean).error?.issues).toBeUndefined()
    }),
    SEED,
  )
})
