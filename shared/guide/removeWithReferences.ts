import type { Id } from '../lib/ids/id'
import { findNode, removeNode, type NodeKind } from './edit'
import type { GuideDocument } from './schema'
import { stepsOf } from './stepsOf'
import { withoutReferences, wordIn, type Target } from './withoutReferences'

/**
 * Takes a node out with all that refers to it. In texts, a reference to it becomes its words: the part's name, the step's title, the
 * figure's caption. With a step or a section go the figures that nothing else shows; with a figure or a model its file, where no other
 * has the same one. A line's nested lines stay, on the outermost level.
 * @returns the same document where there is no such node, and for the only option of a line: remove the line.
 */
export function removeWithReferences(doc: GuideDocument, kind: NodeKind, id: Id): GuideDocument {
  if (kind === 'option' && doc.lines.some(({ options }) => options.length === 1 && options[0]!.id === id))
    return doc
  const without = removeNode(doc, kind, id)
  if (without === doc) return doc
  const gone = goneWith(doc, kind, id)
  const figures = without.figures.filter((figure) => !gone.figure?.has(figure.id))
  const rest = figures.length === without.figures.length ? without : { ...without, figures }
  return withoutFiles(
    doc,
    withoutReferences(rest, {
      isGone: (target, targetId) => gone[target]?.has(targetId) ?? false,
      word: wordIn(doc),
    }),
  )
}

/** All targets of references that go with a node. */
function goneWith(doc: GuideDocument, kind: NodeKind, id: Id): Partial<Record<Target, ReadonlySet<Id>>> {
  switch (kind) {
    case 'line':
      return {
        line: new Set([id]),
        option: new Set(findNode(doc, 'line', id)?.options.map((option) => option.id)),
      }
    case 'section': {
      const steps = doc.sections.find((section) => section.id === id)?.steps ?? []
      return goneWithSteps(doc, new Set(steps.map((step) => step.id)))
    }
    case 'step':
      return goneWithSteps(doc, new Set([id]))
    case 'option':
    case 'tool':
    case 'figure':
    case 'model':
      return { [kind]: new Set([id]) }
    case 'use':
    case 'check':
    case 'caution':
    case 'source':
    case 'callout':
    case 'claim':
    case 'skill':
    case 'credit':
      return {}
  }
}

function goneWithSteps(doc: GuideDocument, step: ReadonlySet<Id>): Partial<Record<Target, ReadonlySet<Id>>> {
  const steps = stepsOf(doc)
  const elsewhere = new Set([doc.front, ...steps.flatMap(({ id, figures }) => (step.has(id) ? [] : figures))])
  const figure = steps
    .filter(({ id }) => step.has(id))
    .flatMap(({ figures }) => figures.filter((shown) => !elsewhere.has(shown)))
  return { step, figure: new Set(figure) }
}

/** Files that nothing shows any more, but did before. */
function withoutFiles(before: GuideDocument, after: GuideDocument): GuideDocument {
  const [had, has] = [filesOf(before), filesOf(after)]
  const assets = after.assets.filter(({ sha256 }) => has.has(sha256) || !had.has(sha256))
  return assets.length === after.assets.length ? after : { ...after, assets }
}

const filesOf = ({ figures, models }: GuideDocument): Set<string | null> =>
  new Set([...figures, ...models].map(({ asset }) => asset))
