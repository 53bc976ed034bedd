import type { Id } from '../lib/ids/id'
import { findNode } from './edit'
import type { Block, Condition, Figure, GuideDocument, Inline, Line, ListItem, Step } from './schema'

/** What a reference can point at. */
export type Target = 'line' | 'option' | 'tool' | 'figure' | 'model' | 'step'

/** Which targets are gone, and the words that take the place of a reference in a text (empty: nothing does). */
export interface Gone {
  /** Leaves conditions as they are, also those that name something gone. */
  keepConditions?: boolean
  isGone: (target: Target, id: Id) => boolean
  word: (target: 'line' | 'figure' | 'step', id: Id) => string
}

/** What takes a reference's place in a text: the part's name, the figure's caption, the step's title, as `doc` has them. */
export function wordIn(doc: GuideDocument): Gone['word'] {
  return (target, id) => {
    switch (target) {
      case 'line':
        return findNode(doc, 'line', id)?.options[0]!.part.name ?? ''
      case 'figure':
        return findNode(doc, 'figure', id)?.caption ?? ''
      case 'step':
        return findNode(doc, 'step', id)?.title ?? ''
    }
  }
}

/**
 * The document without its references to what is gone: uses and balloons of a line, tools, figures and models of steps, models of
 * options and figures, the front figure, what a line stands within, the clauses of conditions. In a text, a reference becomes words.
 * What is unchanged is shared with the old document. Cost O(nodes).
 *
 * A clause of which nothing is left goes, and what hung on it is then there always: nothing that somebody wrote disappears.
 */
export function withoutReferences(doc: GuideDocument, gone: Gone): GuideDocument {
  const lasting = (target: Target) => (id: Id) => !gone.isGone(target, id)
  const always = <T extends { when?: Condition }>(nodes: T[]): T[] =>
    mapShared(nodes, (node) => withWhen(node, gone))
  return withFields(doc, {
    front: doc.front !== null && gone.isGone('figure', doc.front) ? null : doc.front,
    cautions: always(doc.cautions),
    tools: always(doc.tools),
    claims: always(doc.claims),
    sheets: mapShared(doc.sheets, (sheet) => withFields(sheet, { formulas: always(sheet.formulas) })),
    lines: mapShared(doc.lines, (line) => lineWithout(line, gone)),
    figures: mapShared(doc.figures, (figure) => figureWithout(figure, gone)),
    sections: mapShared(doc.sections, (section) =>
      withFields(section, {
        steps: mapShared(section.steps, (step) => stepWithout(step, gone, lasting, always)),
      }),
    ),
  })
}

function stepWithout(
  step: Step,
  gone: Gone,
  lasting: (target: Target) => (id: Id) => boolean,
  always: <T extends { when?: Condition }>(nodes: T[]) => T[],
): Step {
  return withFields(withWhen(step, gone), {
    body: withFields(step.body, { content: blocksWithout(step.body.content, gone) }),
    uses: filterShared(always(step.uses), (use) => !gone.isGone('line', use.line)),
    cautions: always(step.cautions),
    checks: always(step.checks),
    tools: filterShared(step.tools, lasting('tool')),
    figures: filterShared(step.figures, lasting('figure')),
    models: filterShared(step.models, lasting('model')),
  })
}

function lineWithout(line: Line, gone: Gone): Line {
  const lastingOption = (id: Id): boolean => !gone.isGone('option', id)
  const options = mapShared(line.options, (option) =>
    withFields(option, {
      requires: filterShared(option.requires, lastingOption),
      excludes: filterShared(option.excludes, lastingOption),
      print:
        option.print !== undefined && option.print.model !== null && gone.isGone('model', option.print.model)
          ? { ...option.print, model: null }
          : option.print,
    }),
  )
  const within = line.within !== undefined && gone.isGone('line', line.within) ? undefined : line.within
  return withFields(withWhen(line, gone), { options, within })
}

function figureWithout(figure: Figure, gone: Gone): Figure {
  const callouts = filterShared(
    mapShared(figure.callouts, (callout) => withWhen(callout, gone)),
    (callout) => callout.shape !== 'balloon' || !gone.isGone('line', callout.line),
  )
  const model = figure.model !== undefined && gone.isGone('model', figure.model) ? undefined : figure.model
  return withFields(withWhen(figure, gone), { callouts, model })
}

function blocksWithout(blocks: Block[], gone: Gone): Block[] {
  return mapShared(blocks, (block): Block => {
    switch (block.type) {
      case 'paragraph':
        return block.content === undefined
          ? block
          : withFields(block, { content: inlinesWithout(block.content, gone) })
      case 'note':
        return withFields(block, { content: blocksWithout(block.content, gone) })
      case 'orderedList':
      case 'bulletList':
        return withFields(block, { content: mapShared(block.content, (item) => itemWithout(item, gone)) })
    }
  })
}

const itemWithout = (item: ListItem, gone: Gone): ListItem =>
  withFields(item, { attrs: withWhen(item.attrs, gone), content: blocksWithout(item.content, gone) })

function inlinesWithout(inlines: Inline[], gone: Gone): Inline[] {
  const inWords = mapShared(inlines, (inline): Inline => {
    const target = targetOf(inline)
    if (target === undefined || !gone.isGone(target.target, target.id)) return inline
    const marks = 'marks' in inline && inline.marks !== undefined ? { marks: inline.marks } : {}
    return { type: 'text', text: gone.word(target.target, target.id), ...marks }
  })
  return filterShared(inWords, (inline) => inline.type !== 'text' || inline.text !== '')
}

/** What an inline node points at, if it does. */
export function targetOf(inline: Inline): { target: 'line' | 'figure' | 'step'; id: Id } | undefined {
  switch (inline.type) {
    case 'balloon':
      return { target: 'line', id: inline.attrs.line }
    case 'figureRef':
      return { target: 'figure', id: inline.attrs.figure }
    case 'stepRef':
      return { target: 'step', id: inline.attrs.step }
    case 'text':
    case 'lineBreak':
    case 'quantity':
      return undefined
  }
}

function withWhen<T extends { when?: Condition }>(node: T, gone: Gone): T {
  if (node.when === undefined || gone.keepConditions === true) return node
  const clauses = mapShared(
    filterShared(node.when, (clause) => !gone.isGone('line', clause.line)),
    (clause) => withFields(clause, { is: filterShared(clause.is, (id) => !gone.isGone('option', id)) }),
  )
  const when = filterShared(clauses, (clause) => clause.is.length > 0)
  return withFields<{ when?: Condition }>(node, { when: when.length === 0 ? undefined : when }) as T
}

/** A copy with these fields, one that is undefined taken away; the same object where nothing differs. */
function withFields<T extends object>(node: T, fields: Partial<T>): T {
  const old = node as Record<string, unknown>
  const changed = Object.entries(fields).filter(([key, value]) => old[key] !== value)
  if (changed.length === 0) return node
  const kept = Object.entries({ ...old, ...Object.fromEntries(changed) })
  return Object.fromEntries(kept.filter(([key, value]) => value !== undefined || !(key in fields))) as T
}

function mapShared<T>(list: T[], change: (item: T) => T): T[] {
  const next = list.map(change)
  return next.every((item, index) => item === list[index]) ? list : next
}

function filterShared<T>(list: T[], keep: (item: T) => boolean): T[] {
  return list.every(keep) ? list : list.filter(keep)
}
