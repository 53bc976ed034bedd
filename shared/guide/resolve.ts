import type { Id } from '../lib/ids/id'
import { chosenOption, holds, type Choices } from './holds'
import type { Block, Condition, GuideDocument, ListItem } from './schema'
import { stepsOf } from './stepsOf'
import { withoutReferences, wordIn, type Target } from './withoutReferences'

/**
 * The one coherent guide under these choices: every node whose condition fails is left out, every line keeps the chosen option
 * alone, a section without a step is left out, and nothing points at what is absent: uses and callouts of it go, and in a text its
 * words stay. Ids are unchanged; numbering comes after. What has no condition is shared with the document. Cost O(nodes).
 */
export function resolve(doc: GuideDocument, choices: Choices = {}): GuideDocument {
  const here: Here = (nodes) =>
    nodes.some((node) => node.when !== undefined)
      ? nodes.filter((node) => holds(doc, choices, node.when))
      : nodes
  const lines = here(doc.lines).map((line) =>
    line.options.length === 1 ? line : { ...line, options: [chosenOption(line, choices)] },
  )
  const sections = doc.sections
    .map((section) => ({
      ...section,
      steps: here(section.steps).map((step) => ({
        ...step,
        body: { ...step.body, content: presentBlocks(step.body.content, here) },
        uses: here(step.uses),
        cautions: here(step.cautions),
        checks: here(step.checks),
      })),
    }))
    .filter((section) => section.steps.length > 0)
  const present = {
    ...doc,
    cautions: here(doc.cautions),
    claims: here(doc.claims),
    sheets: doc.sheets.map((sheet) => ({ ...sheet, formulas: here(sheet.formulas) })),
    sections,
    lines,
    tools: here(doc.tools),
    figures: here(doc.figures).map((figure) => ({ ...figure, callouts: here(figure.callouts) })),
  }
  const targets = targetsOf(present)
  return withoutReferences(present, {
    isGone: (target, id) => !targets[target].has(id),
    word: wordIn({
      ...doc,
      lines: doc.lines.map((line) => ({ ...line, options: [chosenOption(line, choices)] })),
    }),
  })
}

/** Everything that a document's references can point at. */
export function targetsOf(doc: GuideDocument): Record<Target, ReadonlySet<Id>> {
  const ids = (nodes: readonly { id: Id }[]): Set<Id> => new Set(nodes.map(({ id }) => id))
  return {
    line: ids(doc.lines),
    option: ids(doc.lines.flatMap((line) => line.options)),
    tool: ids(doc.tools),
    figure: ids(doc.figures),
    model: ids(doc.models),
    step: ids(stepsOf(doc)),
  }
}

type Here = <T extends { when?: Condition }>(nodes: T[]) => T[]

function presentBlocks(blocks: Block[], here: Here): Block[] {
  return blocks.flatMap((block): Block[] => {
    if (block.type === 'paragraph') return [block]
    if (block.type === 'note') {
      const content = presentBlocks(block.content, here)
      return content.length === 0 ? [] : [{ ...block, content }]
    }
    const items = presentItems(block.content, here)
    return items.length === 0 ? [] : [{ ...block, content: items }]
  })
}

function presentItems(items: readonly ListItem[], here: Here): ListItem[] {
  return items.flatMap((item): ListItem[] => {
    const content = here([item.attrs]).length === 0 ? [] : presentBlocks(item.content, here)
    return content.length === 0 ? [] : [{ ...item, content }]
  })
}
