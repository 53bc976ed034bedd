import { insertNode } from '../../../../shared/guide/edit'
import type { Block, Figure, GuideDocument, Inline, Step } from '../../../../shared/guide/schema'
import type { Id, NewId } from '../../../../shared/lib/ids/id'

/**
 * Puts a copy of a step after it. Everything in the copy that has an id gets a new one, figures and their callouts too; lines, tools
 * and models are the guide's and are shared. @returns the same document and null where there is no such step.
 */
export function copyStep(
  document: GuideDocument,
  stepId: Id,
  newId: NewId,
): { document: GuideDocument; copy: Id | null } {
  const section = document.sections.find((each) => each.steps.some((step) => step.id === stepId))
  if (section === undefined) return { document, copy: null }
  const at = section.steps.findIndex((step) => step.id === stepId)
  const step = section.steps[at]!
  const figures = document.figures
    .filter((figure) => step.figures.includes(figure.id))
    .map((figure) => ({ from: figure.id, figure: copyFigure(figure, newId) }))
  const figureIds = new Map(figures.map(({ from, figure }) => [from, figure.id]))
  const copy = copyOf(step, figureIds, newId)
  const withFigures = {
    ...document,
    figures: [...document.figures, ...figures.map(({ figure }) => figure)],
  }
  return { document: insertNode(withFigures, 'step', copy, section.id, at + 1), copy: copy.id }
}

function copyOf(step: Step, figureIds: ReadonlyMap<Id, Id>, newId: NewId): Step {
  const fresh = <T extends { id: Id }>(nodes: readonly T[]): T[] =>
    nodes.map((node) => ({ ...node, id: newId() }))
  return {
    ...step,
    id: newId(),
    body: { ...step.body, content: copyBlocks(step.body.content, figureIds, newId) },
    uses: fresh(step.uses),
    cautions: fresh(step.cautions),
    checks: fresh(step.checks),
    figures: step.figures.map((id) => figureIds.get(id) ?? id),
  }
}

const copyFigure = (figure: Figure, newId: NewId): Figure => ({
  ...figure,
  id: newId(),
  callouts: figure.callouts.map((callout) => ({ ...callout, id: newId() })),
})

function copyBlocks(blocks: readonly Block[], figureIds: ReadonlyMap<Id, Id>, newId: NewId): Block[] {
  return blocks.map((block): Block => {
    const attrs = { id: newId() }
    if (block.type === 'paragraph') {
      return block.content === undefined
        ? { ...block, attrs }
        : { ...block, attrs, content: block.content.map((node) => copyInline(node, figureIds)) }
    }
    if (block.type === 'note') {
      return { ...block, attrs, content: copyBlocks(block.content, figureIds, newId) }
    }
    const content = block.content.map((item) => ({
      ...item,
      attrs: { ...item.attrs, id: newId() },
      content: copyBlocks(item.content, figureIds, newId),
    }))
    return { ...block, attrs, content }
  })
}

const copyInline = (node: Inline, figureIds: ReadonlyMap<Id, Id>): Inline =>
  node.type === 'figureRef'
    ? { ...node, attrs: { figure: figureIds.get(node.attrs.figure) ?? node.attrs.figure } }
    : node
