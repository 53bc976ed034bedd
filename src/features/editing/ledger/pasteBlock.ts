import { insertNode } from '../../../../shared/guide/edit'
import type { GuideDocument } from '../../../../shared/guide/schema'
import type { Id, NewId } from '../../../../shared/lib/ids/id'
import { newLine } from '../step/newLine'
import { COLUMNS, setCell, type CellTrouble, type Column, type KindWords } from './columns'

/** A cell that did not take what was written; the text is kept beside the document until it is mended. */
export interface WrongCell {
  line: Id
  column: Column
  text: string
  why: CellTrouble
}

export interface Pasted {
  document: GuideDocument
  wrong: WrongCell[]
  /** Cells that were tried, to forget what was wrong with them before. */
  tried: { line: Id; column: Column }[]
  added: number
  /** Cells that lay right of the last column, and had something in them. */
  beyond: number
}

/**
 * Writes a block of cells from a cell on, to the right and downwards over the lines as they are shown, and makes new lines at the end of the
 * list for rows that are left. A single cell fills a whole range. New lines have no quantity where the block has none: never a silent 1.
 * @param columns those that are shown.
 * @param rows the ids of the lines as shown, from the first row on.
 */
export function pasteBlock(
  doc: GuideDocument,
  rows: readonly Id[],
  at: { row: number; column: number },
  block: readonly (readonly string[])[],
  kinds: KindWords,
  newId: NewId,
  columns: readonly Column[] = COLUMNS,
): Pasted {
  const pasted: Pasted = { document: doc, wrong: [], tried: [], added: 0, beyond: 0 }
  block.forEach((cells, index) => {
    if (cells.every((cell) => cell.trim() === '') && rows[at.row + index] === undefined) return
    let id = rows[at.row + index]
    if (id === undefined) {
      const line = { ...newLine(newId, ''), quantity: null }
      pasted.document = insertNode(pasted.document, 'line', line, null)
      pasted.added += 1
      id = line.id
    }
    // From left to right, so that a quantity stands before its unit and a kind before its model.
    cells.forEach((text, offset) => write(pasted, id, columns[at.column + offset], text, kinds))
  })
  return pasted
}

function write(pasted: Pasted, line: Id, column: Column | undefined, text: string, kinds: KindWords): void {
  if (column === undefined) {
    if (text.trim() !== '') pasted.beyond += 1
    return
  }
  pasted.tried.push({ line, column })
  const outcome = setCell(pasted.document, line, column, text, kinds)
  if (outcome.ok) pasted.document = outcome.document
  else pasted.wrong.push({ line, column, text, why: outcome.why })
}
