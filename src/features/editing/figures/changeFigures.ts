import { findNode, setNode } from '../../../../shared/guide/edit'
import { removeWithReferences } from '../../../../shared/guide/removeWithReferences'
import type { GuideDocument } from '../../../../shared/guide/schema'
import { stepsOf } from '../../../../shared/guide/stepsOf'
import type { Id } from '../../../../shared/lib/ids/id'

/** Moves a figure to a place in the step's order. */
export function moveFigure(doc: GuideDocument, stepId: Id, id: Id, to: number): GuideDocument {
  const figures = findNode(doc, 'step', stepId)?.figures ?? []
  if (!figures.includes(id)) return doc
  const rest = figures.filter((each) => each !== id)
  const at = Math.max(0, Math.min(to, rest.length))
  if (figures.indexOf(id) === at) return doc
  return setNode(doc, 'step', stepId, { figures: [...rest.slice(0, at), id, ...rest.slice(at)] })
}

/** Takes a figure out of the step (or of the front), and out of the guide where nothing else shows it. */
export function removeFigure(doc: GuideDocument, stepId: Id | null, id: Id): GuideDocument {
  const elsewhere =
    stepsOf(doc).some((step) => step.id !== stepId && step.figures.includes(id)) ||
    (stepId !== null && doc.front === id)
  if (!elsewhere) return removeWithReferences(doc, 'figure', id)
  if (stepId === null) return { ...doc, front: null }
  const figures = findNode(doc, 'step', stepId)?.figures ?? []
  return setNode(doc, 'step', stepId, { figures: figures.filter((each) => each !== id) })
}
