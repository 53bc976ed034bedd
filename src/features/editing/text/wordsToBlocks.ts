import type { JSONContent } from '@tiptap/core'
import { LinkAddress } from '../../../../shared/guide/schema'

type Kind = 'orderedList' | 'bulletList' | 'note' | 'paragraph'

const BEGINS: readonly [Kind, RegExp][] = [
  ['orderedList', /^\s*(?:\d{1,3}|[a-z])[.)]\s+/i],
  ['bulletList', /^\s*[-*•–]\s+/],
  ['note', /^\s*>\s?/],
]

/**
 * Plain text that is pasted, with what its writers mean by marks at the beginning of a line and round words: "1. ", "- ", "> ", **strong**, *emphasis*,
 * `code`, [words](address). Headings lose their "#". Lines that follow each other are one paragraph only where the next does not begin
 * something. Blocks have no ids yet.
 */
export function wordsToBlocks(text: string): JSONContent[] {
  const blocks: JSONContent[] = []
  let before: Kind | 'gap' = 'gap'
  for (const line of text.split(/\r\n|\r|\n/)) {
    if (line.trim() === '') {
      before = 'gap'
      continue
    }
    const [kind, begin] =
      BEGINS.find(([, pattern]) => pattern.test(line)) ?? (['paragraph', /^\s*(?:#{1,6}\s+)?/] as const)
    const content = inlines(line.replace(begin, '').trimEnd())
    const last = blocks.at(-1)
    // A list goes on over empty lines; a note does not.
    if (last?.type === kind && kind !== 'paragraph' && (kind !== 'note' || before === 'note')) {
      last.content!.push(...wrapped(kind, content))
    } else if (kind === 'paragraph' && before !== 'gap' && last !== undefined) joinTo(last, content)
    else
      blocks.push(kind === 'paragraph' ? paragraph(content) : { type: kind, content: wrapped(kind, content) })
    before = kind
  }
  return blocks
}

const paragraph = (content: JSONContent[]): JSONContent =>
  content.length === 0 ? { type: 'paragraph' } : { type: 'paragraph', content }

const wrapped = (kind: Kind, content: JSONContent[]): JSONContent[] =>
  kind === 'note' ? [paragraph(content)] : [{ type: 'listItem', content: [paragraph(content)] }]

/** A line that begins nothing goes on with the paragraph before it, also within a list's item. */
function joinTo(block: JSONContent, content: JSONContent[]): void {
  let at = block
  while (at.type !== 'paragraph') at = at.content!.at(-1)!
  at.content = [...(at.content ?? []), { type: 'lineBreak' }, ...content]
}

const MARKED =
  /\*\*([^*\s](?:[^*]*[^*\s])?)\*\*|__([^_\s](?:[^_]*[^_\s])?)__|\*([^*\s](?:[^*]*[^*\s])?)\*|`([^`]+)`|\[([^\]]+)\]\(([^)\s]+)\)/g

/** Words with their marks. What is not marked as it should be stays as it was written. */
export function inlines(line: string): JSONContent[] {
  const found: JSONContent[] = []
  let end = 0
  const plain = (words: string): void => {
    if (words !== '') found.push({ type: 'text', text: words })
  }
  for (const match of line.matchAll(MARKED)) {
    plain(line.slice(end, match.index))
    end = match.index + match[0].length
    const [whole, strong, strong2, emphasis, code, words, href] = match
    if (strong ?? strong2)
      found.push({ type: 'text', text: (strong ?? strong2)!, marks: [{ type: 'strong' }] })
    else if (emphasis) found.push({ type: 'text', text: emphasis, marks: [{ type: 'emphasis' }] })
    else if (code) found.push({ type: 'text', text: code, marks: [{ type: 'code' }] })
    else if (words && LinkAddress.safeParse(href).success)
      found.push({ type: 'text', text: words, marks: [{ type: 'link', attrs: { href } }] })
    else plain(words ?? whole)
  }
  plain(line.slice(end))
  return found
}
