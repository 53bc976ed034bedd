import type { Id } from '../lib/ids/id'
import { numbering, type Numbering } from './numbering'
import { quantityText } from './quantityText'
import type { Block, GuideDocument, Inline, RichText } from './schema'

/** What stands in plain text for a balloon, a figure's or a step's reference: a part's name, "7.1", "8". */
export interface Words {
  line: (id: Id) => string
  figure: (id: Id) => string
  step: (id: Id) => string
}

/** The words of a document: parts by name (the designer's option), figures and steps by number. Nothing for what is not there. */
export function wordsOf(doc: GuideDocument, numbers: Numbering = numbering(doc)): Words {
  const names = new Map(doc.lines.map((line) => [line.id, line.options[0]!.part.name]))
  return {
    line: (id) => names.get(id) ?? '',
    figure: (id) => numbers.figure[id] ?? '',
    step: (id) => String(numbers.step[id] ?? ''),
  }
}

/** Rich text as plain text, a line for each paragraph; for search, descriptions of pages, and to see whether anything is said. */
export function plainText(text: RichText, words: Words): string {
  return text.content.flatMap((block) => linesOf(block, words)).join('\n')
}

function linesOf(block: Block, words: Words): string[] {
  switch (block.type) {
    case 'paragraph': {
      const line = (block.content ?? []).map((inline) => inlineText(inline, words)).join('')
      return line.trim() === '' ? [] : [line]
    }
    case 'note':
      return block.content.flatMap((inner) => linesOf(inner, words))
    case 'orderedList':
    case 'bulletList':
      return block.content.flatMap((item) => item.content.flatMap((inner) => linesOf(inner, words)))
  }
}

function inlineText(inline: Inline, words: Words): string {
  switch (inline.type) {
    case 'text':
      return inline.text
    case 'lineBreak':
      return '\n'
    case 'quantity':
      return quantityText(inline.attrs)
    case 'balloon':
      return words.line(inline.attrs.line)
    case 'figureRef':
      return words.figure(inline.attrs.figure)
    case 'stepRef':
      return words.step(inline.attrs.step)
  }
}

/** Every node within paragraphs, in reading order. */
export function inlinesOf(text: RichText): Inline[] {
  const within = (block: Block): Inline[] =>
    block.type === 'paragraph'
      ? (block.content ?? [])
      : block.type === 'note'
        ? block.content.flatMap(within)
        : block.content.flatMap((item) => item.content.flatMap(within))
  return text.content.flatMap(within)
}
