import { RichText } from '../guide/schema'
import type { Block, List, ListItem } from '../guide/schema/text'
import { plainCell } from './readTable'
import { plainPiece, plainWords, type Piece, type Words } from './page'

/** Lists and notes below this are flattened: a guide's text may not nest without end. */
const DEEPEST = 6

type Inline = NonNullable<Extract<Block, { type: 'paragraph' }>['content']>[number]

/**
 * The text of a step. A table becomes a list with a row in each item, code keeps its lines. Ids are placeholders; they are made anew
 * on taking. Links that lead to files become their words.
 */
export function toBody(pieces: readonly Piece[]): RichText {
  const maker = new BodyMaker()
  const content = maker.blocks(pieces, 0).slice(0, 1000)
  const body: RichText = { type: 'doc', content: content.length === 0 ? [maker.paragraph([])] : content }
  const read = RichText.safeParse(body)
  if (read.success) return body
  // Larger or deeper than a guide holds: the words are kept, the form is not.
  const text = pieces.map(plainPiece).join(' ').slice(0, 20_000)
  return { type: 'doc', content: [maker.paragraph(text === '' ? [] : [{ type: 'text', text }])] }
}

class BodyMaker {
  private made = 0

  private id(): string {
    this.made += 1
    return `block-${String(this.made).padStart(10, '0')}`
  }

  blocks(pieces: readonly Piece[], depth: number): Block[] {
    return pieces.flatMap((piece) => this.block(piece, depth))
  }

  paragraph(content: Inline[]): Block {
    return {
      type: 'paragraph',
      attrs: { id: this.id() },
      ...(content.length > 0 ? { content: content.slice(0, 2000) } : {}),
    }
  }

  private block(piece: Piece, depth: number): Block[] {
    switch (piece.kind) {
      case 'heading':
      case 'paragraph': {
        const words = piece.words.flatMap(asInline)
        return words.length === 0 ? [] : [this.paragraph(words)]
      }
      case 'list':
        return this.list(piece, depth)
      case 'note': {
        const content = depth >= DEEPEST ? [] : this.blocks(piece.pieces, depth + 1).slice(0, 50)
        if (content.length > 0) return [{ type: 'note', attrs: { id: this.id() }, content }]
        return this.words(plainPiece(piece))
      }
      case 'table':
        return this.table(piece.cells)
      case 'code':
        return [
          this.paragraph(
            piece.text.split('\n').flatMap((line, at): Inline[] => [
              ...(at > 0 ? [{ type: 'lineBreak' } as const] : []),
              ...(line === ''
                ? []
                : [
                    {
                      type: 'text' as const,
                      text: line.slice(0, 20_000),
                      marks: [{ type: 'code' as const }],
                    },
                  ]),
            ]),
          ),
        ]
      case 'rule':
        return []
    }
  }

  private words(text: string): Block[] {
    return text === '' ? [] : [this.paragraph([{ type: 'text', text: text.slice(0, 20_000) }])]
  }

  private list(piece: Extract<Piece, { kind: 'list' }>, depth: number): Block[] {
    if (depth >= DEEPEST) return this.words(plainPiece(piece))
    const items = piece.items.slice(0, 500).flatMap((item): ListItem[] => {
      const content = this.blocks(item, depth + 1).slice(0, 200)
      return content.length === 0 ? [] : [{ type: 'listItem', attrs: { id: this.id() }, content }]
    })
    const type: List['type'] = piece.ordered ? 'orderedList' : 'bulletList'
    return items.length === 0 ? [] : [{ type, attrs: { id: this.id() }, content: items }]
  }

  /** "R13 — Effective bellows length: 190; Length of rubber to cut: 250". */
  private table(cells: readonly string[][]): Block[] {
    const [heading = [], ...rows] = cells
    const items = rows
      .map((row) => {
        const [first = '', ...others] = row.map(plainCell)
        const told = others.flatMap((cell, at) => {
          const label = plainCell(heading[at + 1] ?? '')
          return cell === '' ? [] : [label === '' ? cell : `${label}: ${cell}`]
        })
        return [first, told.join('; ')].filter((part) => part !== '').join(' — ')
      })
      .filter((text) => text !== '')
    const texts = items.length > 0 ? items : heading.map(plainCell).filter((text) => text !== '')
    if (texts.length === 0) return []
    const content = texts.slice(0, 500).map((text): ListItem => ({
      type: 'listItem',
      attrs: { id: this.id() },
      content: this.words(text),
    }))
    return [{ type: 'bulletList', attrs: { id: this.id() }, content }]
  }
}

function asInline(word: Words): Inline[] {
  if (word.type === 'lineBreak') return [word]
  const marks = (word.marks ?? []).filter((mark) => mark.type !== 'link' || isLink(mark.attrs.href))
  const text = word.text.slice(0, 20_000)
  return text === '' ? [] : [marks.length === 0 ? { type: 'text', text } : { type: 'text', text, marks }]
}

const isLink = (href: string): boolean => /^(https?:\/\/|mailto:)\S+$/i.test(href) && href.length <= 2000

/** Whether there is nothing in these pieces but pictures. */
export const isWordless = (pieces: readonly Piece[]): boolean =>
  pieces.every((piece) => (piece.kind === 'paragraph' ? plainWords(piece.words) : plainPiece(piece)) === '')
