import { parseQuantity } from '../guide/parseQuantity'
import { isKnownHeading, meaningOf } from './headingWords'
import type { ColumnMeaning, UnderstoodColumn, UnderstoodRow, UnderstoodTable } from './understanding'

const MOST_COLUMNS = 200
const MOST_ROWS = 3000

/** Tables of one sheet: several may stand side by side or below each other. Rows keep the order of the sheet. */
export function readTable(
  cells: readonly (readonly string[])[],
  from: string,
  sheet: string,
  keyed: string,
): UnderstoodTable[] {
  const rows = cells.slice(0, MOST_ROWS).map((row) =>
    row.slice(0, MOST_COLUMNS).map((cell) =>
      cell
        .replace(/\p{Surrogate}/gu, '\uFFFD')
        .trim()
        .slice(0, 4000),
    ),
  )
  const width = rows.reduce((widest, row) => Math.max(widest, row.length), 0)
  const tables = sideBySide(rows, width).flatMap((part) => below(part))
  return tables
    .filter((table) => table.some((row) => row.some((cell) => cell !== '')))
    .map((table, at) =>
      tableOf(table, { from, sheet, key: tables.length === 1 ? keyed : `${keyed}-${at + 1}` }),
    )
}

/** Splits at columns that are empty all the way, if every part has headings of its own. */
function sideBySide(rows: string[][], width: number): string[][][] {
  const isEmpty = Array.from({ length: width }, (_, at) => rows.every((row) => (row[at] ?? '') === ''))
  const parts: [number, number][] = []
  for (let at = 0; at < width; at += 1) {
    if (isEmpty[at]) continue
    const last = parts.at(-1)
    if (last !== undefined && last[1] === at) last[1] = at + 1
    else parts.push([at, at + 1])
  }
  if (parts.length < 2) return [rows]
  const cut = parts.map(([start, end]) => rows.map((row) => row.slice(start, end)))
  const whole = cut.every(
    (part) => findHeading(part) !== undefined && meaningsOf(part[findHeading(part)!]!).has('name'),
  )
  return whole ? cut : [rows]
}

/** A row of headings further down begins another table. What stands above the first heading belongs to the first. */
function below(rows: string[][]): string[][][] {
  const tables: string[][][] = [[]]
  let headings = 0
  for (const row of rows) {
    if (isHeading(row)) {
      headings += 1
      if (headings > 1) {
        const caption = takeCaption(tables.at(-1)!)
        tables.push(caption)
      }
    }
    tables.at(-1)!.push(row)
  }
  return tables
}

/** Rows of one cell right above a heading are its title, and go with it. */
function takeCaption(rows: string[][]): string[][] {
  let at = rows.length
  while (
    at > 1 &&
    rows[at - 1]!.filter((cell) => cell !== '').length === 1 &&
    !/total|sum|:/i.test(rows[at - 1]!.join(''))
  )
    at -= 1
  return rows.splice(at)
}

const meaningsOf = (row: readonly string[]): Set<ColumnMeaning> =>
  new Set(row.flatMap((cell) => meaningOf(cell) ?? []))

/** At least two columns of different known meaning, one of them what a list cannot be without; no cell that is a number. */
function isHeading(row: readonly string[]): boolean {
  const filled = row.filter((cell) => cell !== '')
  const meanings = meaningsOf(filled)
  if (meanings.size < 2 || filled.filter(isKnownHeading).length < 2) return false
  if (filled.some((cell) => /^[\d.,€$£¥\s]+$/.test(cell))) return false
  return (
    meanings.has('quantity') ||
    meanings.has('name') ||
    meanings.has('partNumber') ||
    meanings.has('specification')
  )
}

const findHeading = (rows: readonly (readonly string[])[]): number | undefined => {
  const at = rows.slice(0, 30).findIndex(isHeading)
  return at === -1 ? undefined : at
}

function tableOf(rows: string[][], of: { from: string; sheet: string; key: string }): UnderstoodTable {
  const headingRow = findHeading(rows) ?? null
  const columns = headingRow === null ? guessColumns(rows) : columnsOf(rows[headingRow]!, rows)
  const table = {
    ...of,
    headingRow,
    columns,
    rows: rows.map((cells, at) => rowOf(cells, `${of.key}r${at + 1}`)),
  }
  return { ...judgeRows(table), include: isPartsList(columns) }
}

const rowOf = (cells: string[], key: string): UnderstoodRow => ({
  key,
  cells,
  kind: 'line',
  problem: null,
  include: true,
})

/** A list of parts has names, and says how many, what they cost or where they come from. */
export function isPartsList(columns: readonly UnderstoodColumn[]): boolean {
  const has = (meaning: ColumnMeaning): boolean => columns.some((column) => column.meaning === meaning)
  if (!has('name') && !(has('quantity') && (has('partNumber') || has('specification')))) return false
  return has('quantity') || has('price') || has('link') || has('supplier') || has('partNumber')
}

/** Columns by a row of headings. One name and one quantity: a second of either is kept as a note. */
export function columnsOf(
  heading: readonly string[],
  rows: readonly (readonly string[])[],
): UnderstoodColumn[] {
  const width = rows.reduce((widest, row) => Math.max(widest, row.length), heading.length)
  const taken = new Set<ColumnMeaning>()
  const columns = Array.from({ length: width }, (_, index): UnderstoodColumn => {
    const text = (heading[index] ?? '').slice(0, 300)
    let meaning = meaningOf(text) ?? (text === '' ? 'ignore' : 'note')
    if (taken.has(meaning) && (meaning === 'name' || meaning === 'quantity')) meaning = 'note'
    taken.add(meaning)
    return { index, heading: text, meaning }
  })
  if (taken.has('name')) return columns
  // A list without "Part" is named by its description, else by its value or its reference.
  const named =
    columns.find(
      ({ meaning, heading: text }) => meaning === 'specification' && /desc|besch|說明|说明/i.test(text),
    ) ??
    columns.find(({ meaning }) => meaning === 'specification') ??
    columns.find(({ meaning }) => meaning === 'reference')
  return columns.map((column) => (column === named ? { ...column, meaning: 'name' } : column))
}

/** Without headings: the column of numbers is the quantity, the one of the longest texts the name. */
function guessColumns(rows: readonly (readonly string[])[]): UnderstoodColumn[] {
  const width = rows.reduce((widest, row) => Math.max(widest, row.length), 0)
  const share = (at: number, holds: (cell: string) => boolean): number => {
    const filled = rows.map((row) => row[at] ?? '').filter((cell) => cell !== '')
    return filled.length < 2 ? 0 : filled.filter(holds).length / filled.length
  }
  const all = Array.from({ length: width }, (_, at) => at)
  const quantity = all.find((at) => share(at, (cell) => /^[x×~]?\s?\d{1,4}\s?[x×]?$/i.test(cell)) >= 0.8)
  const name = all.find((at) => at !== quantity && share(at, (cell) => /\p{L}{3}/u.test(cell)) >= 0.8)
  return all.map((index) => ({
    index,
    heading: '',
    meaning:
      quantity !== undefined && name !== undefined
        ? index === quantity
          ? 'quantity'
          : index === name
            ? 'name'
            : 'note'
        : 'ignore',
  }))
}

export const cellOf = (row: Pick<UnderstoodRow, 'cells'>, column: UnderstoodColumn | undefined): string =>
  column === undefined ? '' : (row.cells[column.index] ?? '')

/** A cell without Markdown: links as their words, no stars. */
export const plainCell = (cell: string): string =>
  cell
    .replace(/!?\[([^\]]*)\]\([^)]*\)/g, '$1')
    .replace(/\*\*|__|`/g, '')
    .replace(/\s+/g, ' ')
    .trim()

const TOTAL =
  /^(sub|grand )?-?totals?\b|^sum(me)?\b|^gesamt|^suma?\b|^somme\b|^totale\b|合计|合計|总计|總計|المجموع/i

/** Says of each row what it is, and what is wrong with it. */
export function judgeRows<T extends Pick<UnderstoodTable, 'headingRow' | 'columns' | 'rows'>>(table: T): T {
  const { headingRow, columns } = table
  const column = (meaning: ColumnMeaning): UnderstoodColumn | undefined =>
    columns.find((one) => one.meaning === meaning)
  const quantity = column('quantity')
  const name = column('name')
  const width = headingRow === null ? 0 : (table.rows[headingRow]?.cells.length ?? 0)
  const rows = table.rows.map((row, at): UnderstoodRow => {
    const filled = row.cells
      .map((cell, index) => ({ text: plainCell(cell), index }))
      .filter(({ text }) => text !== '')
    const first = filled[0]
    const is = (kind: UnderstoodRow['kind'], problem: string | null = null): UnderstoodRow => ({
      ...row,
      kind,
      problem,
    })
    if (first === undefined) return is('empty')
    if (at === headingRow || (headingRow !== null && at > headingRow && isHeading(row.cells)))
      return is('heading')
    if (headingRow !== null && at < headingRow) return is('note')
    const named = plainCell(cellOf(row, name))
    if (filled.some(({ text }) => TOTAL.test(text)) && (TOTAL.test(first.text) || named === ''))
      return is('total')
    if (filled.every(({ text }) => /^[-–—:|]+$/.test(text))) return is('empty')
    if (filled.length === 1 && columns.filter(({ meaning }) => meaning !== 'ignore').length > 1) {
      return named === '' && first.index > 1 ? is('note') : is('section')
    }
    if (named === '' && filled.every(({ text }) => /^[\d.,€$£¥\s]+$/.test(text))) return is('total')
    return is('line', problemOf(row, { quantity, name, columns, width }))
  })
  return { ...table, rows }
}

function problemOf(
  row: UnderstoodRow,
  of: {
    quantity: UnderstoodColumn | undefined
    name: UnderstoodColumn | undefined
    columns: readonly UnderstoodColumn[]
    width: number
  },
): string | null {
  const shifted = shiftOf(row, of.quantity)
  if (shifted !== null) {
    const heading = of.columns.find(({ index }) => index === shifted)?.heading ?? ''
    return `This row seems to be shifted: its number stands under “${heading.slice(0, 100)}”. Write the name and the quantity of this line yourself.`
  }
  const extra = of.width > 0 ? row.cells.slice(of.width).filter((cell) => cell !== '') : []
  if (extra.length > 0)
    return 'This row has more cells than there are headings. See whether each cell is in its column.'
  if (of.name !== undefined && plainCell(cellOf(row, of.name)) === '')
    return 'This row has no name. Write what the part is.'
  if (of.quantity === undefined) return null
  const typed = quantityCell(row, of.quantity)
  if (typed === '' || /^[-–—?x×]+$/i.test(typed))
    return 'This row does not say how many. Write the quantity, or “as needed”.'
  return quantityOf(typed) === undefined
    ? `“${typed.slice(0, 80)}” is no quantity that can be read. Write how many are needed.`
    : null
}

export const quantityCell = (
  row: Pick<UnderstoodRow, 'cells'>,
  column: UnderstoodColumn | undefined,
): string => plainCell(cellOf(row, column))

/** The column in which the number stands where the quantity's own cell holds words instead, else null. */
export function shiftOf(
  row: Pick<UnderstoodRow, 'cells'>,
  quantity: UnderstoodColumn | undefined,
): number | null {
  if (quantity === undefined) return null
  const own = quantityCell(row, quantity)
  if (own === '' || quantityOf(own) !== undefined || !/^\p{L}/u.test(own)) return null
  const beside = [quantity.index - 1, quantity.index + 1].find((at) =>
    /^[~x×]?\d{1,5}[x×]?$/i.test(plainCell(row.cells[at] ?? '')),
  )
  return beside ?? null
}

/** What a quantity's cell says: "2x", "1 each", "8/4*" is none. @returns undefined where it cannot be read, null for "as needed". */
export function quantityOf(typed: string): ReturnType<typeof read> {
  return read(typed.replace(/[⁰¹²³⁴-⁹]+$/u, '').trim())
}

function read(typed: string) {
  const parsed = parseQuantity(typed)
  if (parsed.ok) return parsed.quantity
  // "2 x", "(4)", "4 (one spare)": the number stands, the rest is kept as typed.
  const plain = /^\(?\s*(\d+)\s*\)?$|^(\d+)\s*\([^)\d]*\)$/.exec(typed)
  const again = plain === null ? undefined : parseQuantity(plain[1] ?? plain[2] ?? '')
  return again?.ok === true && again.quantity !== null
    ? { ...again.quantity, typed: typed.slice(0, 60) }
    : undefined
}
