import { moveNode } from '../../../../shared/guide/edit'
import type { GuideDocument } from '../../../../shared/guide/schema'
import type { Id } from '../../../../shared/lib/ids/id'

/** Where a step stands: its section and its place in it. */
export function placeOf(document: GuideDocument, stepId: Id): { section: number; step: number } | undefined {
  for (const [section, { steps }] of document.sections.entries()) {
    const step = steps.findIndex((each) => each.id === stepId)
    if (step >= 0) return { section, step }
  }
  return undefined
}

/**
 * One place up or down. From the first or last place in a section a step goes on into the next section.
 * @returns the same document at the very top and the very bottom.
 */
export function nudgeStep(document: GuideDocument, stepId: Id, by: -1 | 1): GuideDocument {
  const at = placeOf(document, stepId)
  if (at === undefined) return document
  const here = document.sections[at.section]!
  const place = at.step + by
  if (place >= 0 && place < here.steps.length) return moveNode(document, 'step', stepId, here.id, place)
  const next = document.sections[at.section + by]
  if (next === undefined) return document
  return moveNode(document, 'step', stepId, next.id, by === 1 ? 0 : next.steps.length)
}

export function nudgeSection(document: GuideDocument, sectionId: Id, by: -1 | 1): GuideDocument {
  const at = document.sections.findIndex((section) => section.id === sectionId)
  const place = at + by
  if (at < 0 || place < 0 || place >= document.sections.length) return document
  return moveNode(document, 'section', sectionId, null, place)
}

/** What is dragged, and on to which row: a step lands after a step, or first in a section; a section lands at another's place. */
export interface Drop {
  kind: 'step' | 'section'
  id: Id
  on: { kind: 'step' | 'section'; id: Id }
  /** The upper half of a row means before it. */
  before: boolean
}

/** @returns the same document where the drop would change nothing. */
export function drop(document: GuideDocument, { kind, id, on, before }: Drop): GuideDocument {
  if (id === on.id) return document
  if (kind === 'section') return dropSection(document, id, on, before)
  if (on.kind === 'section') return dropOnSection(document, id, on.id, before)
  const target = placeOf(document, on.id)
  const from = placeOf(document, id)
  if (target === undefined || from === undefined) return document
  const shift = from.section === target.section && from.step < target.step ? -1 : 0
  const index = target.step + shift + (before ? 0 : 1)
  if (from.section === target.section && index === from.step) return document
  return moveNode(document, 'step', id, document.sections[target.section]!.id, index)
}

/** On a section's heading: its upper half is the end of the section before, its lower half the section's first place. */
function dropOnSection(document: GuideDocument, id: Id, sectionId: Id, before: boolean): GuideDocument {
  const at = document.sections.findIndex((section) => section.id === sectionId)
  const section = document.sections[before && at > 0 ? at - 1 : at]
  if (section === undefined) return document
  const last = before && at > 0
  const rest = section.steps.filter((step) => step.id !== id).length
  const from = placeOf(document, id)
  const index = last ? rest : 0
  if (from !== undefined && document.sections[from.section]!.id === section.id && from.step === index) {
    return document
  }
  return moveNode(document, 'step', id, section.id, index)
}

function dropSection(document: GuideDocument, id: Id, on: Drop['on'], before: boolean): GuideDocument {
  const from = document.sections.findIndex((section) => section.id === id)
  const target =
    on.kind === 'section'
      ? document.sections.findIndex((section) => section.id === on.id)
      : (placeOf(document, on.id)?.section ?? -1)
  if (from < 0 || target < 0 || from === target) return document
  const goesBefore = on.kind === 'section' ? before : from > target
  const index = target + (from < target ? -1 : 0) + (goesBefore ? 0 : 1)
  return index === from ? document : moveNode(document, 'section', id, null, index)
}
