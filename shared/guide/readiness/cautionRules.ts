import type { Caution, Step } from '../schema'
import { isBlank, onStepOrGuide, stepNumber, type Found, type Look, type Rule, type Values } from './rule'

/** Rules about cautions: a signal word alone protects nobody. */
export const cautionRules = {
  'caution-no-hazard': {
    must: true,
    find: cautionsWhere(({ hazard }) => isBlank(hazard), 'hazard'),
    concerns: hasCautions,
  },
  'caution-no-avoid': {
    must: true,
    find: cautionsWhere(({ avoid }) => isBlank(avoid), 'avoid'),
    concerns: hasCautions,
  },
} satisfies Record<string, Rule>

function hasCautions({ doc, steps }: Look): boolean {
  return doc.cautions.length > 0 || steps.some(({ cautions }) => cautions.length > 0)
}

function cautionsWhere(isWrong: (caution: Caution) => boolean, field: string): (look: Look) => Found[] {
  return (look) =>
    [null, ...look.steps].flatMap((step): Found[] =>
      (step === null ? look.doc.cautions : step.cautions).filter(isWrong).map(({ id }) => ({
        place: onStepOrGuide(step, id, field),
        values: placeValues(look, step),
      })),
    )
}

const placeValues = (look: Look, step: Step | null): Values =>
  step === null ? { context: 'guide' } : { step: stepNumber(look, step) }
