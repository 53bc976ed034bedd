import type { Id, NewId } from '../lib/ids/id'
import type { Figure, GuideDocument, Step } from './schema'

/**
 * Puts a copy of a step behind it. Everything within has a new id, and so have copies of its figures, so that a callout moved in one does not
 * move in the other; what the copy's text says of itself and of its figures points at the copies. Lines, tools, models and files are shared.
 * @returns the document and the copy's id; undefined where there is no such step.
 */
export function copyStep(
  doc: GuideDocument,
  stepId: Id,
  newId: NewId,
): { document: GuideDocument; copy: Id } | undefined {
  const step = doc.sections.flatMap((section) => section.steps).find(({ id }) => id === stepId)
  if (step === undefined) return undefined
  const figures = doc.figures.filter(({ id }) => step.figures.includes(id))
  const fresh = freshIds([step, ...figures], newId)
  const copy = renamed(step, fresh)
  return {
    copy: copy.id,
    document: {
      ...doc,
      figures: doc.figures.flatMap((figure): Figure[] =>
        figures.includes(figure) ? [figure, renamed(figure, fresh)] : [figure],
      ),
      sections: doc.sections.map((section) =>
        section.steps.includes(step)
          ? {
              ...section,
              steps: section.steps.flatMap((each): Step[] => (each === step ? [each, copy] : [each])),
            }
          : section,
      ),
    },
  }
}

/** A new id for every node within these: `id` fields are what has one, other fields only refer. */
function freshIds(nodes: readonly unknown[], newId: NewId): ReadonlyMap<string, Id> {
  const fresh = new Map<string, Id>()
  const walk = (value: unknown): void => {
    if (typeof value !== 'object' || value === null) return
    for (const [key, child] of Object.entries(value)) {
      if (key === 'id' && typeof child === 'string') fresh.set(child, newId())
      else walk(child)
    }
  }
  walk(nodes)
  return fresh
}

/** A deep copy with the old ids replaced, those that own and those that refer; only strings that are such an id. */
function renamed<T>(value: T, fresh: ReadonlyMap<string, Id>): T {
  const walk = (part: unknown): unknown => {
    if (typeof part === 'string') return fresh.get(part) ?? part
    if (Array.isArray(part)) return part.map(walk)
    if (typeof part !== 'object' || part === null) return part
    return Object.fromEntries(Object.entries(part).map(([key, child]) => [key, walk(child)]))
  }
  return walk(value) as T
}
