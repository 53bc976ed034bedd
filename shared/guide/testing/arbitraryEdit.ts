import { copyStep } from '../copyStep'
import { insertNode, moveNode, removeNode, setNode, type NodeKind } from '../edit'
import { takeFromSteps } from '../reconcile'
import { removeWithReferences } from '../removeWithReferences'
import type { Block, GuideDocument, Step } from '../schema'
import { stepsOf } from '../stepsOf'
import { DocumentMaker, WORDS } from './arbitraryDocument'
import type { Draws } from './draws'

export type Edit = (doc: GuideDocument) => GuideDocument

/** What a person does to a document, some times over. `who` names the ids of what is added. */
export function editSome(doc: GuideDocument, draws: Draws, who: string, most = 6): GuideDocument {
  const maker = new DocumentMaker(draws, who)
  let edited = doc
  for (let count = 1 + draws.below(most); count > 0; count -= 1) edited = editOnce(edited, draws, maker, who)
  return edited
}

function editOnce(doc: GuideDocument, draws: Draws, maker: DocumentMaker, who: string): GuideDocument {
  const steps = stepsOf(doc)
  const step = steps.length > 0 ? draws.of(steps) : undefined
  const said = `${who} ${draws.of(WORDS)}`
  const edits: Edit[] = [
    (now) => ({ ...now, title: said }),
    (now) => insertNode(now, 'line', maker.line(), null, draws.below(now.lines.length + 1)),
    (now) =>
      insertNode(now, 'section', { id: maker.newId('section'), title: said, steps: [maker.step()] }, null, 0),
    (now) => removeAny(now, draws, removeNode),
    (now) => removeAny(now, draws, removeWithReferences),
    (now) => moveAny(now, draws),
    (now) => (now.lines.length > 0 ? takeFromSteps(now, draws.of(now.lines).id) : now),
    (now) => (now.lines.length > 0 ? setNode(now, 'line', draws.of(now.lines).id, { note: said }) : now),
  ]
  if (step !== undefined) {
    edits.push(
      (now) => setNode(now, 'step', step.id, { title: said, minutes: draws.below(60) }),
      (now) => setNode(now, 'step', step.id, { body: withBlocks(step, draws, maker, said) }),
      (now) => setNode(now, 'step', step.id, { body: withBlocks(step, draws, maker, said) }),
      (now) => insertNode(now, 'step', maker.step(), draws.of(now.sections).id, draws.below(3)),
      (now) => insertNode(now, 'check', maker.check(), step.id),
      (now) => insertNode(now, 'caution', maker.caution(), draws.yes() ? step.id : null),
      (now) => copyStep(now, step.id, () => maker.newId('copy'))?.document ?? now,
    )
  }
  return draws.of(edits)(doc)
}

function removeAny(
  doc: GuideDocument,
  draws: Draws,
  remove: (doc: GuideDocument, kind: NodeKind, id: string) => GuideDocument,
): GuideDocument {
  const kind = draws.of([
    'section',
    'step',
    'use',
    'line',
    'option',
    'tool',
    'figure',
    'callout',
    'model',
  ] as const)
  const nodes = nodesOf(doc, kind)
  const id = nodes.length > 0 ? draws.of(nodes) : undefined
  if (id === undefined) return doc
  const onlyOption =
    kind === 'option' && doc.lines.some(({ options }) => options.length === 1 && options[0]!.id === id)
  return onlyOption ? doc : remove(doc, kind, id)
}

/** The ids of all nodes of a kind. */
export function nodesOf(doc: GuideDocument, kind: NodeKind): string[] {
  const steps = stepsOf(doc)
  const options = doc.lines.flatMap((line) => line.options)
  const lists: Record<NodeKind, readonly { id: string }[]> = {
    section: doc.sections,
    step: steps,
    use: steps.flatMap(({ uses }) => uses),
    check: steps.flatMap(({ checks }) => checks),
    caution: [...doc.cautions, ...steps.flatMap(({ cautions }) => cautions)],
    line: doc.lines,
    option: options,
    source: options.flatMap(({ sources }) => sources),
    tool: doc.tools,
    figure: doc.figures,
    callout: doc.figures.flatMap(({ callouts }) => callouts),
    model: doc.models,
    claim: doc.claims,
    skill: doc.skills,
    credit: doc.credits,
  }
  return lists[kind].map(({ id }) => id)
}

function moveAny(doc: GuideDocument, draws: Draws): GuideDocument {
  if (draws.yes()) {
    const steps = stepsOf(doc)
    if (steps.length === 0) return doc
    return moveNode(doc, 'step', draws.of(steps).id, draws.of(doc.sections).id, draws.below(3))
  }
  const kind = draws.of(['section', 'line', 'figure', 'tool'] as const)
  const nodes = nodesOf(doc, kind)
  return nodes.length > 0 ? moveNode(doc, kind, draws.of(nodes), null, draws.below(nodes.length)) : doc
}

/** What a text editor does: words in a paragraph, a block more or less, a block put into a list, two blocks exchanged. */
function withBlocks(step: Step, draws: Draws, maker: DocumentMaker, said: string): Step['body'] {
  const blocks = step.body.content
  const at = draws.below(blocks.length)
  const before = blocks.slice(0, at)
  const [block, ...after] = blocks.slice(at)
  if (block === undefined || draws.yes(5)) return { type: 'doc', content: [...blocks, maker.block()] }
  const changed: (() => Block[])[] = [
    () => [reworded(block, draws, said), ...after],
    () => after,
    () => [
      {
        type: 'bulletList',
        attrs: { id: maker.newId('list') },
        content: [{ type: 'listItem', attrs: { id: maker.newId('item') }, content: [block] }],
      },
      ...after,
    ],
    () => [...after, block],
  ]
  return { type: 'doc', content: [...before, ...draws.of(changed)()] }
}

function reworded(block: Block, draws: Draws, said: string): Block {
  if (block.type === 'paragraph') return { ...block, content: [{ type: 'text', text: said }] }
  const at = draws.below(block.content.length)
  if (block.type === 'note')
    return {
      ...block,
      content: block.content.map((inner, index) => (index === at ? reworded(inner, draws, said) : inner)),
    }
  return {
    ...block,
    content: block.content.flatMap((item, index) =>
      index !== at
        ? [item]
        : draws.yes(4) && block.content.length > 1
          ? []
          : [{ ...item, content: [reworded(item.content[0]!, draws, said), ...item.content.slice(1)] }],
    ),
  }
}
