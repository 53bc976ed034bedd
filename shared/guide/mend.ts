import { choicesFor } from './choices'
import { findNode, setNode } from './edit'
import type { Finding } from './finding'
import { holds } from './holds'
import type { RuleName } from './readiness'
import { reconcileLine, usesByLine } from './reconcile'
import { targetsOf } from './resolve'
import type { GuideDocument } from './schema'
import { withoutReferences } from './withoutReferences'

type Mend = (doc: GuideDocument, finding: Finding) => GuideDocument

/** Findings that one press can mend, without anybody's judgement. What the button says stands under `mend` in readiness.json. */
const MENDS: Partial<Record<RuleName, Mend>> = {
  'line-more-used': take,
  'line-more-listed': take,
  'line-no-quantity': take,
  'check-reversed': exchangeLimits,
  'check-no-lower': onlyOne,
  'check-no-upper': onlyOne,
  'text-reference-gone': dropGone,
  'callout-gone': dropGone,
  'figure-gone': dropGone,
  'tool-gone': dropGone,
  'model-gone': dropGone,
  'front-figure-gone': dropGone,
  'printed-model-gone': dropGone,
  'within-gone': dropGone,
}

/** The document with this finding mended; undefined for a finding that a person has to think about, and for one that is out of date. */
export function mend(doc: GuideDocument, finding: Finding): GuideDocument | undefined {
  const mended = (MENDS as Record<string, Mend | undefined>)[finding.rule]?.(doc, finding)
  return mended === doc ? undefined : mended
}

/** Takes what the steps use, if it is the same whatever is chosen: one quantity cannot be right for choices that need different ones. */
function take(doc: GuideDocument, { place }: Finding): GuideDocument {
  const line = doc.lines.find(({ id }) => id === place.node)
  if (line === undefined) return doc
  const uses = usesByLine(doc).get(line.id) ?? []
  const conditions = [line.when, ...uses.flatMap(({ step, use }) => [step.when, use.when])]
  const found = choicesFor(doc, conditions)
    .filter((choices) => holds(doc, choices, line.when))
    .map((choices) => reconcileLine(doc, line, uses, choices).used)
  const used = found[0]
  if (used === undefined || used === null || found.some((other) => other?.value !== used.value)) return doc
  return setNode(doc, 'line', line.id, { quantity: used })
}

function exchangeLimits(doc: GuideDocument, { place }: Finding): GuideDocument {
  const measure = measureOf(doc, place.node)
  return measure === null
    ? doc
    : setNode(doc, 'check', place.node!, {
        measure: { ...measure, atLeast: measure.atMost, atMost: measure.atLeast },
      })
}

function onlyOne(doc: GuideDocument, { place }: Finding): GuideDocument {
  const measure = measureOf(doc, place.node)
  return measure === null
    ? doc
    : setNode(doc, 'check', place.node!, { measure: { ...measure, oneSided: true } })
}

const measureOf = (doc: GuideDocument, check: string | null) =>
  (check === null ? undefined : findNode(doc, 'check', check))?.measure ?? null

/**
 * All references that point at nothing go at once: none of them tells anybody anything. Conditions stay: without its condition a node
 * would be there for everybody, and that is for a person to say.
 */
function dropGone(doc: GuideDocument): GuideDocument {
  const targets = targetsOf(doc)
  return withoutReferences(doc, {
    keepConditions: true,
    isGone: (target, id) => !targets[target].has(id),
    word: () => '',
  })
}
