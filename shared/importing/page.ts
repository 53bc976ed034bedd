/** Text of a page with the marks that a guide keeps. */
export type Words = { type: 'text'; text: string; marks?: Mark[] } | { type: 'lineBreak' }
export type Mark =
  { type: 'strong' } | { type: 'emphasis' } | { type: 'code' } | { type: 'link'; attrs: { href: string } }

/** A picture where a page shows it; `address` as written. */
export interface Picture {
  address: string
  alt: string
  title: string
}

/** What a page is made of, in its order. Pictures within a text are taken out of it and kept beside it. */
export type Piece =
  | { kind: 'heading'; depth: number; words: Words[]; pictures: Picture[] }
  | { kind: 'paragraph'; words: Words[]; pictures: Picture[] }
  | { kind: 'list'; ordered: boolean; items: Piece[][] }
  /** A quotation or a box; `label` is "warning", "tip" … where it has one. */
  | { kind: 'note'; label: string; pieces: Piece[] }
  /** Cells are text with links as `[text](address)`. */
  | { kind: 'table'; cells: string[][]; pictures: Picture[] }
  | { kind: 'code'; text: string; language: string }
  | { kind: 'rule' }

export interface Page {
  pieces: Piece[]
  /** Addresses of every link, as written, in order. */
  links: string[]
  /** What the page holds that a guide cannot: videos, frames, drawings in code. */
  left: { what: string; why: string }[]
}

export const plainWords = (words: readonly Words[]): string =>
  words
    .map((word) => (word.type === 'text' ? word.text : ' '))
    .join('')
    .replace(/\s+/g, ' ')
    .trim()

/** The text of a piece without its marks, pictures left out. */
export function plainPiece(piece: Piece): string {
  switch (piece.kind) {
    case 'heading':
    case 'paragraph':
      return plainWords(piece.words)
    case 'list':
      return piece.items.map((item) => item.map(plainPiece).join(' ')).join(' ')
    case 'note':
      return piece.pieces.map(plainPiece).join(' ')
    case 'table':
      return piece.cells.map((row) => row.join(' ')).join(' ')
    case 'code':
      return piece.text
    case 'rule':
      return ''
  }
}

/** The pictures of pieces in reading order. */
export function picturesOf(pieces: readonly Piece[]): Picture[] {
  return pieces.flatMap((piece) => {
    switch (piece.kind) {
      case 'heading':
      case 'paragraph':
      case 'table':
        return piece.pictures
      case 'list':
        return piece.items.flatMap(picturesOf)
      case 'note':
        return picturesOf(piece.pieces)
      case 'code':
      case 'rule':
        return []
    }
  })
}
