import { chosenOption, holds, type Choices } from './holds'
import type { Block, Condition, GuideDocument, ListItem } from './schema'

/**
 * The one coherent guide under these choices: every node whose condition fails is left out, every line keeps the chosen option
 * alone, and what pointed at an absent node is left out with it. Ids are unchanged; numbering comes after.
 */
export function resolve(doc: GuideDocument, choices: Choices = {}): GuideDocument {
  const here = <T extends { when?: Condition }>(nodes: readonly T[]): T[] =>
    nodes.filter((node) => holds(doc, choices, node.when))
  const lines = here(doc.lines).map((line) => ({ ...line, options: [chosenOption(line, choices)] }))
  const lineIds = new Set(lines.map((line) => line.id))
  const tools = here(doc.tools)
  const toolIds = new Set(tools.map((tool) => tool.id))
  const figures = here(doc.figures).map((figure) => ({
    ...figure,
    callouts: here(figure.callouts).filter(
      (callout) => callout.shape !== 'balloon' || lineIds.has(callout.line),
    ),
  }))
  const figureIds = new Set(figures.map((figure) => figure.id))
  const sections = doc.sections
    .map((section) => ({
      ...section,
      steps: here(section.steps).map((step) => ({
        ...step,
        body: { ...step.body, content: presentBlocks(step.body.content, here) },
        uses: here(step.uses).filter((use) => lineIds.has(use.line)),
        cautions: here(step.cautions),
        checks: here(step.checks),
        tools: step.tools.filter((id) => toolIds.has(id)),
        figures: step.figures.filter((id) => figureIds.has(id)),
      })),
    }))
    .filter((section) => section.steps.length > 0)
  return {
    ...doc,
    front: doc.front !== null && figureIds.has(doc.front) ? doc.front : null,
    cautions: here(doc.cautions),
    claims: here(doc.claims),
    sections,
    lines,
    tools,
    figures,
  }
}

type Here = <T extends { when?: Condition }>(nodes: readonly T[]) => T[]

function presentBlocks(blocks: readonly Block[], here: Here): Block[] {
  return blocks.flatMap((block): Block[] => {
    if (block.type === 'paragraph') return [block]
    if (block.type === 'note') return [{ ...block, content: presentBlocks(block.content, here) }]
    const items = presentItems(block.content, here)
    return items.length === 0 ? [] : [{ ...block, content: items }]
  })
}

function presentItems(items: readonly ListItem[], here: Here): ListItem[] {
  return items
    .filter((item) => here([item.attrs]).length > 0)
    .map((item) => ({ ...item, content: presentBlocks(item.content, here) }))
}
