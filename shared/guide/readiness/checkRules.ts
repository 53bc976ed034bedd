import Big from 'big.js'
import type { Check } from '../schema'
import { isBlank, onStep, type Found, type Look, type Rule } from './rule'

type Measured = NonNullable<Check['measure']>

/** Rules about checks: what is measured needs limits that can be kept. */
export const checkRules = {
  'check-empty': { must: true, find: checksWhere(({ text }) => isBlank(text), 'text'), concerns: hasChecks },
  'check-no-limits': {
    must: true,
    find: checksWhere(
      measured(({ atLeast, atMost }) => atLeast === null && atMost === null),
      'atLeast',
    ),
    concerns: hasMeasures,
  },
  'check-no-lower': {
    must: true,
    find: checksWhere(
      measured(({ atLeast, atMost, oneSided }) => atLeast === null && atMost !== null && !oneSided),
      'atLeast',
    ),
    concerns: hasMeasures,
  },
  'check-no-upper': {
    must: true,
    find: checksWhere(
      measured(({ atLeast, atMost, oneSided }) => atLeast !== null && atMost === null && !oneSided),
      'atMost',
    ),
    concerns: hasMeasures,
  },
  'check-reversed': {
    must: true,
    find: checksWhere(
      measured(({ atLeast, atMost }) => atLeast !== null && atMost !== null && Big(atLeast).gt(atMost)),
      'atLeast',
    ),
    concerns: hasMeasures,
  },
} satisfies Record<string, Rule>

function hasChecks({ steps }: Look): boolean {
  return steps.some(({ checks }) => checks.length > 0)
}

function hasMeasures({ steps }: Look): boolean {
  return steps.some(({ checks }) => checks.some(({ measure }) => measure !== null))
}

function measured(isWrong: (measure: Measured) => boolean): (check: Check) => boolean {
  return ({ measure }) => measure !== null && isWrong(measure)
}

function checksWhere(isWrong: (check: Check) => boolean, field: string): (look: Look) => Found[] {
  return ({ steps, numbers }) =>
    steps.flatMap((step) =>
      step.checks.filter(isWrong).map((check) => ({
        place: onStep(step.id, check.id, field),
        values: {
          check: numbers.check[check.id]!,
          least: check.measure?.atLeast ?? '',
          most: check.measure?.atMost ?? '',
        },
      })),
    )
}
