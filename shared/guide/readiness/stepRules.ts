import type { Step } from '../schema'
import { inlinesOf, plainText } from '../plainText'
import { isBlank, onStep, orNameless, stepNumber, type Found, type Look, type Rule } from './rule'

/** Rules about sections and steps. */
export const stepRules = {
  'step-untitled': {
    must: true,
    find: stepsWhere((step) => isBlank(step.title), 'title'),
    concerns: hasSteps,
  },
  'step-empty': {
    must: true,
    find: stepsWhere(
      (step, { words }) =>
        step.figures.length === 0 &&
        step.checks.length === 0 &&
        isBlank(plainText(step.body, words)) &&
        inlinesOf(step.body).length === 0,
      'body',
    ),
    concerns: hasSteps,
  },
  'section-untitled': {
    must: false,
    find: ({ doc, numbers }) =>
      doc.sections
        .filter((section) => isBlank(section.title))
        .map((section) => ({
          place: { page: 'guide', step: null, node: section.id, field: 'title' },
          values: { section: numbers.section[section.id]! },
        })),
    concerns: ({ doc }) => doc.sections.length > 0,
  },
  'section-empty': {
    must: false,
    find: ({ doc, numbers, steps }) =>
      doc.sections
        .filter((section) => section.steps.length === 0 && steps.length > 0)
        .map((section) => ({
          place: { page: 'guide', step: null, node: section.id, field: null },
          values: { section: numbers.section[section.id]!, title: orNameless(section.title) },
        })),
    concerns: ({ doc }) => doc.sections.length > 0,
  },
  'step-no-minutes': {
    must: false,
    find: stepsWhere((step) => step.minutes === null, 'minutes'),
    concerns: hasSteps,
  },
  'step-no-figure': {
    must: false,
    find: stepsWhere((step) => step.figures.length === 0, 'figures'),
    concerns: hasSteps,
  },
} satisfies Record<string, Rule>

function hasSteps({ steps }: Look): boolean {
  return steps.length > 0
}

function stepsWhere(isWrong: (step: Step, look: Look) => boolean, field: string): (look: Look) => Found[] {
  return (look) =>
    look.steps
      .filter((step) => isWrong(step, look))
      .map((step) => ({
        place: onStep(step.id, null, field),
        values: { step: stepNumber(look, step), title: orNameless(step.title) },
      }))
}
