import { removeNode } from '../../../../shared/guide/edit'
import type { GuideDocument, Step } from '../../../../shared/guide/schema'
import type { Id } from '../../../../shared/lib/ids/id'

/** The document without a step, and without the figures that only this step showed. */
export function removeStep(document: GuideDocument, stepId: Id): GuideDocument {
  const without = removeNode(document, 'step', stepId)
  return without === document ? document : dropFigures(document, without, [stepId])
}

/** The document without a section, its steps, and the figures that only those showed. */
export function removeSection(document: GuideDocument, sectionId: Id): GuideDocument {
  const steps = document.sections.find((section) => section.id === sectionId)?.steps ?? []
  const without = removeNode(document, 'section', sectionId)
  return dropFigures(
    document,
    without,
    steps.map((step) => step.id),
  )
}

function dropFigures(before: GuideDocument, after: GuideDocument, gone: readonly Id[]): GuideDocument {
  const had = new Set(stepsOf(before).flatMap((step) => (gone.includes(step.id) ? step.figures : [])))
  const kept = new Set([...stepsOf(after).flatMap((step) => step.figures), after.front])
  const figures = after.figures.filter((figure) => !had.has(figure.id) || kept.has(figure.id))
  return figures.length === after.figures.length ? after : { ...after, figures }
}

/** All steps in reading order. */
export const stepsOf = (document: GuideDocument): Step[] =>
  document.sections.flatMap((section) => section.steps)
