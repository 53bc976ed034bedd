import type { JSONContent } from '@tiptap/core'
import type { RichText } from '../../../../shared/guide/schema'
import type { NewId } from '../../../../shared/lib/ids/id'

/** Stored text for the editor. It always has a block to write in, which an empty text has not. */
export function toEditor(text: RichText, newId: NewId): JSONContent {
  return text.content.length > 0
    ? text
    : { type: 'doc', content: [{ type: 'paragraph', attrs: { id: newId() } }] }
}

/** The longest run of text that the schema takes in one node. */
const LONGEST = 20_000

/** The editor's JSON as it is stored: nothing that is null or empty, no marks on line breaks, no half characters. */
export function fromEditor(json: JSONContent): RichText {
  // The editor's schema is the stored one (see textNodes), which the round trip in convert.test.ts holds.
  return { type: 'doc', content: (json.content ?? []).flatMap(stored) } as RichText
}

function stored(node: JSONContent): JSONContent[] {
  if (node.type === 'lineBreak') return [{ type: 'lineBreak' }]
  const { type } = node
  const attrs = Object.entries(node.attrs ?? {}).filter(([, value]) => value !== null && value !== undefined)
  const content = (node.content ?? []).flatMap(stored)
  const rest = {
    ...(attrs.length > 0 && { attrs: Object.fromEntries(attrs) }),
    ...(content.length > 0 && { content }),
    ...(node.marks !== undefined && node.marks.length > 0 && { marks: node.marks.map(storedMark) }),
  }
  if (node.text === undefined) return [{ type, ...rest }]
  const text = node.text.replace(/\p{Surrogate}/gu, '')
  const pieces = text.match(new RegExp(`[^]{1,${LONGEST}}`, 'gu')) ?? []
  return pieces.map((piece) => ({ type, text: piece, ...rest }))
}

const storedMark = ({ type, attrs }: { type: string; attrs?: Record<string, unknown> }) =>
  attrs === undefined || Object.keys(attrs).length === 0 ? { type } : { type, attrs }

/** Nothing is written in it. */
export const isBlank = ({ content }: RichText): boolean =>
  content.length === 0 ||
  (content.length === 1 && content[0]!.type === 'paragraph' && content[0]!.content === undefined)
