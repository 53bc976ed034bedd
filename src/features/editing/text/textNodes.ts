import { Node } from '@tiptap/core'
import { ReactNodeViewRenderer } from '@tiptap/react'
import { Condition, Measure } from '../../../../shared/guide/schema'
import { quantityText } from '../../../../shared/guide/quantityText'
import { BalloonInText, FigureInText, QuantityInText, StepInText } from './nodeViews'
import type { TextHost } from './textHost'

/** Names of the nodes that have a lasting id. */
export const BLOCKS: ReadonlySet<string> = new Set([
  'paragraph',
  'orderedList',
  'bulletList',
  'listItem',
  'note',
])

// Ids are not copied with text: what is pasted gets new ones (see lastingIds).
const id = { id: { default: null, rendered: false } }

const Doc = Node.create({ name: 'doc', topNode: true, content: 'block+' })

const Text = Node.create({ name: 'text', group: 'inline' })

/** Headings that are pasted become paragraphs: a step has its title, and its text is short. */
const Paragraph = Node.create({
  name: 'paragraph',
  // Before the other blocks, so that it is what an empty place is filled with.
  priority: 1000,
  group: 'block',
  content: 'inline*',
  addAttributes: () => id,
  parseHTML: () => [
    { tag: 'p' },
    ...[1, 2, 3, 4, 5, 6].map((level) => ({ tag: `h${level}` })),
    { tag: 'pre' },
  ],
  renderHTML: ({ HTMLAttributes }) => ['p', HTMLAttributes, 0],
})

const OrderedList = Node.create({
  name: 'orderedList',
  group: 'block',
  content: 'listItem+',
  addAttributes: () => id,
  parseHTML: () => [{ tag: 'ol' }],
  renderHTML: ({ HTMLAttributes }) => ['ol', HTMLAttributes, 0],
})

const BulletList = Node.create({
  name: 'bulletList',
  group: 'block',
  content: 'listItem+',
  addAttributes: () => id,
  parseHTML: () => [{ tag: 'ul' }],
  renderHTML: ({ HTMLAttributes }) => ['ul', HTMLAttributes, 0],
})

const ListItem = Node.create({
  name: 'listItem',
  content: 'block+',
  defining: true,
  draggable: true,
  addAttributes: () => ({
    ...id,
    when: {
      default: null,
      parseHTML: (element: HTMLElement) => readJson(element.dataset.when, Condition),
      renderHTML: ({ when }: Record<string, unknown>) =>
        when === null || when === undefined ? {} : { 'data-when': JSON.stringify(when) },
    },
  }),
  parseHTML: () => [{ tag: 'li' }],
  renderHTML: ({ HTMLAttributes }) => ['li', HTMLAttributes, 0],
})

const Note = Node.create({
  name: 'note',
  group: 'block',
  content: 'block+',
  defining: true,
  addAttributes: () => id,
  parseHTML: () => [{ tag: 'aside' }, { tag: 'blockquote' }],
  renderHTML: ({ HTMLAttributes }) => ['aside', HTMLAttributes, 0],
})

const LineBreak = Node.create({
  name: 'lineBreak',
  group: 'inline',
  inline: true,
  selectable: false,
  parseHTML: () => [{ tag: 'br' }],
  renderHTML: () => ['br'],
  renderText: () => '\n',
})

const atom = { group: 'inline', inline: true, atom: true, selectable: true, draggable: true } as const

/**
 * Nodes that point at something are copied as `<span data-line="id">words</span>`. Where the target is not in this guide, the span is no such
 * node and its words remain.
 */
function pointer(
  name: 'balloon' | 'figureRef' | 'stepRef',
  attr: 'line' | 'figure' | 'step',
  host: TextHost,
) {
  const view = { line: BalloonInText, figure: FigureInText, step: StepInText }[attr]
  return Node.create({
    ...atom,
    name,
    addAttributes: () => ({
      [attr]: { default: '', parseHTML: (element: HTMLElement) => element.dataset[attr] },
    }),
    parseHTML: () => [
      {
        tag: `span[data-${attr}]`,
        getAttrs: (element: HTMLElement) => (host.has(attr, element.dataset[attr] ?? '') ? null : false),
      },
    ],
    renderHTML: ({ node }) => {
      const target = String(node.attrs[attr])
      return ['span', { [`data-${attr}`]: target }, host.word(attr, target)]
    },
    renderText: ({ node }) => host.word(attr, String(node.attrs[attr])),
    addNodeView: () => ReactNodeViewRenderer(view, { as: 'span', className: `in-text ${attr}` }),
  })
}

const Quantity = Node.create({
  ...atom,
  name: 'quantity',
  addAttributes: () => ({
    value: { default: '0', parseHTML: (element: HTMLElement) => element.getAttribute('value') },
    unit: { default: 'one', parseHTML: (element: HTMLElement) => element.dataset.unit },
    typed: {
      default: null,
      parseHTML: (element: HTMLElement) => element.dataset.typed ?? null,
    },
  }),
  parseHTML: () => [
    {
      tag: 'data[data-unit]',
      getAttrs: (element: HTMLElement) =>
        Measure.safeParse({ value: element.getAttribute('value'), unit: element.dataset.unit }).success
          ? null
          : false,
    },
  ],
  renderHTML: ({ node }) => {
    const { value, unit, typed } = node.attrs
    return [
      'data',
      {
        value: String(value),
        'data-unit': String(unit),
        ...(typed === null ? {} : { 'data-typed': String(typed) }),
      },
      quantityText(Measure.parse({ value, unit })),
    ]
  },
  renderText: ({ node }) => quantityText(Measure.parse({ value: node.attrs.value, unit: node.attrs.unit })),
  addNodeView: () => ReactNodeViewRenderer(QuantityInText, { as: 'span', className: 'in-text' }),
})

/** The nodes of shared/guide/schema/text.ts, no more and no fewer. */
export const textNodes = (host: TextHost) => [
  Doc,
  Text,
  Paragraph,
  OrderedList,
  BulletList,
  ListItem,
  Note,
  LineBreak,
  pointer('balloon', 'line', host),
  Quantity,
  pointer('figureRef', 'figure', host),
  pointer('stepRef', 'step', host),
]

/** What foreign HTML says of itself is believed only where it fits the schema. */
function readJson<T>(
  text: string | undefined,
  schema: { safeParse: (value: unknown) => { success: boolean; data?: T } },
): T | null {
  if (text === undefined) return null
  try {
    return schema.safeParse(JSON.parse(text)).data ?? null
  } catch (error) {
    if (error instanceof SyntaxError) return null
    throw error
  }
}
