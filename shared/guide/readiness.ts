import type { Facts } from './facts'
import type { Finding } from './finding'
import { cautionRules } from './readiness/cautionRules'
import { checkRules } from './readiness/checkRules'
import { figureRules } from './readiness/figureRules'
import { fileRules } from './readiness/fileRules'
import { frontRules } from './readiness/frontRules'
import { lineRules } from './readiness/lineRules'
import { referenceRules } from './readiness/referenceRules'
import { lookAt, type Rule } from './readiness/rule'
import { stepRules } from './readiness/stepRules'
import type { GuideDocument } from './schema'

/** Every rule by its name; its sentences stand under the same name in `src/locales/<language>/readiness.json`. */
export const RULES = {
  ...frontRules,
  ...stepRules,
  ...lineRules,
  ...referenceRules,
  ...figureRules,
  ...fileRules,
  ...checkRules,
  ...cautionRules,
} as const satisfies Record<string, Rule>

export type RuleName = keyof typeof RULES

const rules = Object.entries(RULES) as [RuleName, Rule][]

/**
 * What must and what should be mended before publishing: musts first, in the order of the rules. It knows nothing of offers, builds
 * and translations. Cost O(nodes), and for what has conditions the number of choices that make a difference to it.
 */
export function readiness(doc: GuideDocument, facts: Facts): Finding[] {
  const look = lookAt(doc, facts)
  const findings = rules.flatMap(([rule, { must, find }]) =>
    find(look).map(({ place, values = {} }): Finding => ({ rule, must, place, values })),
  )
  return [...findings.filter(({ must }) => must), ...findings.filter(({ must }) => !must)]
}

/** The rules that concern something in the document and found nothing wrong with it. Their sentences stand under `inOrder`. */
export function rulesInOrder(doc: GuideDocument, facts: Facts, findings: readonly Finding[]): RuleName[] {
  const look = lookAt(doc, facts)
  const broken = new Set(findings.map(({ rule }) => rule))
  return rules
    .filter(([rule, { concerns }]) => !broken.has(rule) && (concerns === undefined || concerns(look)))
    .map(([rule]) => rule)
}
