import type { Id } from '../../lib/ids/id'
import { choicesWithout, namesOfChoices } from '../choices'
import type { FindingPlace } from '../finding'
import { lineById } from '../holds'
import { inlinesOf } from '../plainText'
import type { Block, Condition, Line, Step } from '../schema'
import { targetOf, type Target } from '../withoutReferences'
import {
  lineValues,
  onGuide,
  onParts,
  onStep,
  onStepOrGuide,
  stepNumber,
  type Found,
  type Look,
  type Rule,
} from './rule'
import { figureValues } from './figureRules'

/** Rules about references: everything that points somewhere points at something, whatever is chosen. */
export const referenceRules = {
  'use-not-listed': {
    must: true,
    find: (look) =>
      inSteps(look, (step) =>
        step.uses
          .filter((use) => !look.targets.line.has(use.line))
          .map((use) => onStep(step.id, use.id, 'line')),
      ),
  },
  'text-reference-gone': {
    must: true,
    find: (look) =>
      look.steps.flatMap((step) => {
        const gone = inlinesOf(step.body).flatMap((inline) => {
          const target = targetOf(inline)
          return target === undefined || look.targets[target.target].has(target.id) ? [] : [target.target]
        })
        return [...new Set(gone)].map((context) => ({
          place: onStep(step.id, null, 'body'),
          values: { step: stepNumber(look, step), context },
        }))
      }),
  },
  'callout-gone': {
    must: true,
    find: (look) =>
      look.shown.flatMap(({ figure, step }) =>
        figure.callouts
          .filter((callout) => callout.shape === 'balloon' && !look.targets.line.has(callout.line))
          .map(({ id }) => ({ place: onStepOrGuide(step, id, 'line'), values: figureValues(look, figure) })),
      ),
  },
  'figure-gone': { must: true, find: listedGone('figure', 'figures') },
  'tool-gone': { must: true, find: listedGone('tool', 'tools') },
  'model-gone': { must: true, find: listedGone('model', 'models') },
  'front-figure-gone': {
    must: true,
    find: ({ doc, targets }) =>
      doc.front === null || targets.figure.has(doc.front) ? [] : [{ place: onGuide('front') }],
  },
  'printed-model-gone': {
    must: true,
    find: (look) =>
      linesWhere(look, 'model', ({ options }) =>
        options.some(({ print }) => typeof print?.model === 'string' && !look.targets.model.has(print.model)),
      ),
  },
  'within-gone': {
    must: true,
    find: (look) =>
      linesWhere(look, 'within', ({ within }) => within !== undefined && !look.targets.line.has(within)),
  },
  'within-circle': {
    must: true,
    find: (look) => linesWhere(look, 'within', (line) => isWithinItself(look, line)),
  },
  'condition-gone': { must: true, find: conditionsGone },
  'use-absent': {
    must: true,
    find: (look) =>
      inStepsWith(look, (step) =>
        step.uses.flatMap((use) => {
          const line = lineById(look.doc, use.line)
          return absent(look, [step.when, use.when], line?.when, onStep(step.id, use.id, 'when'), line)
        }),
      ),
    concerns: hasConditions,
  },
  'text-absent': {
    must: true,
    find: (look) => inStepsWith(look, (step) => bodyAbsent(look, step)),
    concerns: hasConditions,
  },
} satisfies Record<string, Rule>

function inSteps(look: Look, places: (step: Step) => FindingPlace[]): Found[] {
  return look.steps.flatMap((step) =>
    places(step).map((place) => ({ place, values: { step: stepNumber(look, step) } })),
  )
}

function inStepsWith(look: Look, found: (step: Step) => Found[]): Found[] {
  if (!hasConditions(look)) return []
  return look.steps.flatMap((step) =>
    found(step).map(({ place, values }) => ({ place, values: { step: stepNumber(look, step), ...values } })),
  )
}

function listedGone(target: Target, field: 'figures' | 'tools' | 'models'): (look: Look) => Found[] {
  return (look) =>
    inSteps(look, (step) =>
      step[field].some((id) => !look.targets[target].has(id)) ? [onStep(step.id, null, field)] : [],
    )
}

function linesWhere(look: Look, field: string, isWrong: (line: Line) => boolean): Found[] {
  return look.doc.lines
    .filter(isWrong)
    .map((line) => ({ place: onParts(line.id, field), values: lineValues(look, line) }))
}

function isWithinItself({ doc }: Look, line: Line): boolean {
  if (line.within === undefined) return false
  const above = new Map(doc.lines.map(({ id, within }) => [id, within]))
  const met = new Set<Id>()
  for (let at: Id | undefined = line.within; at !== undefined && !met.has(at); at = above.get(at)) {
    if (at === line.id) return true
    met.add(at)
  }
  return false
}

/** Every condition, with where it stands. */
function conditionsOf({ doc, steps, shown }: Look): { when: Condition | undefined; place: FindingPlace }[] {
  return [
    ...[...doc.cautions, ...doc.claims].map(({ id, when }) => ({ when, place: onGuide('when', id) })),
    ...doc.lines.map(({ id, when }) => ({ when, place: onParts(id, 'when') })),
    ...steps.flatMap((step) => [
      { when: step.when, place: onStep(step.id, null, 'when') },
      ...[...step.uses, ...step.cautions, ...step.checks].map(({ id, when }) => ({
        when,
        place: onStep(step.id, id, 'when'),
      })),
      ...itemConditions(step.body.content).map((when) => ({ when, place: onStep(step.id, null, 'body') })),
    ]),
    ...doc.tools.map(({ id, when }) => {
      const step = steps.find(({ tools }) => tools.includes(id))
      return { when, place: step === undefined ? onGuide('when', id) : onStep(step.id, id, 'when') }
    }),
    ...shown.flatMap(({ figure, step }) =>
      [figure, ...figure.callouts].map(({ id, when }) => ({ when, place: onStepOrGuide(step, id, 'when') })),
    ),
  ]
}

function itemConditions(blocks: readonly Block[]): (Condition | undefined)[] {
  return blocks.flatMap((block) => {
    if (block.type === 'paragraph') return []
    if (block.type === 'note') return itemConditions(block.content)
    return block.content.flatMap((item) => [item.attrs.when, ...itemConditions(item.content)])
  })
}

function hasConditions(look: Look): boolean {
  return conditionsOf(look).some(({ when }) => when !== undefined)
}

function conditionsGone(look: Look): Found[] {
  const { doc, targets, numbers } = look
  const options = new Map(doc.lines.map((line) => [line.id, new Set(line.options.map(({ id }) => id))]))
  return conditionsOf(look)
    .filter(({ when }) =>
      when?.some(({ line, is }) => !targets.line.has(line) || is.some((id) => !options.get(line)?.has(id))),
    )
    .map(({ place }): Found => {
      if (place.step !== null) return { place, values: { context: 'step', step: numbers.step[place.step]! } }
      const line = place.page === 'parts' ? doc.lines.find(({ id }) => id === place.node) : undefined
      return line === undefined
        ? { place }
        : { place, values: { context: 'line', ...lineValues(look, line) } }
    })
}

/** Something is there under choices under which what it needs is not. */
function absent(
  look: Look,
  present: readonly (Condition | undefined)[],
  needed: Condition | undefined,
  place: FindingPlace,
  line: Line | undefined,
): Found[] {
  const choices = choicesWithout(look.doc, present, needed)
  if (choices === undefined) return []
  const named = line === undefined ? {} : lineValues(look, line)
  return [{ place, values: { ...named, with: namesOfChoices(look.doc, choices) } }]
}

/** Balloons and references to steps in a text that is there while the part or the step is not. */
function bodyAbsent(look: Look, step: Step): Found[] {
  const place = onStep(step.id, null, 'body')
  const seen = new Set<Id>()
  const inBlocks = (blocks: readonly Block[], outer: readonly (Condition | undefined)[]): Found[] =>
    blocks.flatMap((block): Found[] => {
      if (block.type === 'note') return inBlocks(block.content, outer)
      if (block.type !== 'paragraph')
        return block.content.flatMap((item) => inBlocks(item.content, [...outer, item.attrs.when]))
      return (block.content ?? []).flatMap((inline): Found[] => {
        const target = targetOf(inline)
        if (target === undefined || target.target === 'figure' || seen.has(target.id)) return []
        const line = lineById(look.doc, target.id)
        const other = look.steps.find(({ id }) => id === target.id)
        const found = absent(look, outer, (line ?? other)?.when, place, line)
        if (found.length > 0) seen.add(target.id)
        return line !== undefined || other === undefined
          ? found
          : found.map(({ values }) => ({
              place,
              values: { ...values, context: 'step', other: stepNumber(look, other) },
            }))
      })
    })
  return inBlocks(step.body.content, [step.when])
}
