import type { Quantity } from '../guide/schema'
import { cellOf, plainCell, quantityCell, quantityOf, shiftOf } from './readTable'
import type {
  ColumnMeaning,
  UnderstoodColumn,
  UnderstoodLine,
  UnderstoodRow,
  UnderstoodSource,
  UnderstoodTable,
} from './understanding'

/** A line together with the addresses that its row names, by which models are found. */
export interface LineOfRow {
  line: UnderstoodLine
  addresses: string[]
}

/** The lines of a table, one for each row that is one. Keys follow from the row, so that reading it anew gives the same. */
export function linesOfTable(table: UnderstoodTable): LineOfRow[] {
  if (!table.include) return []
  const lines: LineOfRow[] = []
  let section = ''
  for (const row of table.rows) {
    if (row.kind === 'section') section = plainCell(row.cells.find((cell) => cell !== '') ?? '')
    if (row.kind === 'line' && row.include) lines.push(lineOf(table, row, section))
  }
  return lines
}

function lineOf(table: UnderstoodTable, row: UnderstoodRow, section: string): LineOfRow {
  const all = (meaning: ColumnMeaning): UnderstoodColumn[] =>
    table.columns.filter((column) => column.meaning === meaning)
  const texts = (meaning: ColumnMeaning): string[] =>
    all(meaning)
      .map((column) => plainCell(cellOf(row, column)))
      .filter((text) => text !== '')
  const quantityColumn = all('quantity')[0]
  const shifted = shiftOf(row, quantityColumn)
  const named = withoutMark(texts('name')[0] ?? '')
  const name =
    shifted === null
      ? named
      : (row.cells
          .slice(0, shifted)
          .map(plainCell)
          .filter((cell) => /\p{L}/u.test(cell))
          .at(-1) ?? named)
  const [first, ...others] = alternatives(name)
  const [designation = '', ...otherNumbers] = alternatives(texts('partNumber').join(', '))
  const typed = shifted === null ? quantityCell(row, quantityColumn) : plainCell(row.cells[shifted] ?? '')
  const read = shifted === null ? quantityOf(typed) : undefined
  const unit = texts('unit')[0]
  const quantity =
    read === undefined || read === null || unit === undefined ? (read ?? null) : withUnit(read, typed, unit)
  const note = [
    ...(isPlainSheet(table.sheet) ? [] : [table.sheet]),
    ...(section === '' ? [] : [section]),
    ...texts('group'),
    ...texts('reference'),
    ...labelled(table, row, 'note'),
    ...labelled(table, row, 'pack'),
    ...labelled(table, row, 'level'),
    ...(shifted === null
      ? []
      : row.cells
          .slice(shifted + 1)
          .map(plainCell)
          .filter((cell) => cell !== '')),
  ]
  const printed = row.cells.some((cell) => /\.(stl|3mf|obj|amf)\b/i.test(cell))
  const line: UnderstoodLine = {
    key: `${row.key}l`,
    name: (first ?? '').slice(0, 300),
    specification: shifted === null ? texts('specification').join('; ').slice(0, 4000) : '',
    designation: shifted === null ? designation.slice(0, 300) : '',
    kind: printed ? 'printed' : 'bought',
    quantity,
    asNeeded: read === null,
    typed: typed.slice(0, 200),
    note: note.join('. ').slice(0, 4000),
    sources: sourcesOf(table, row, first ?? ''),
    substitutes: [...others, ...otherNumbers, ...texts('substitute')]
      .map((text) => text.slice(0, 300))
      .filter((text) => !/^[-–—]+$/.test(text))
      .slice(0, 29),
    modelKey: null,
    tableKey: table.key,
    include: true,
  }
  return { line, addresses: row.cells.flatMap(addressesIn) }
}

/** What stands in columns without a place of their own keeps its heading, but for plain remarks. */
function labelled(table: UnderstoodTable, row: UnderstoodRow, meaning: ColumnMeaning): string[] {
  return table.columns
    .filter((column) => column.meaning === meaning)
    .flatMap((column) => {
      const text = plainCell(cellOf(row, column))
      if (text === '' || text === '-' || withoutMark(text) === '') return []
      return [/note|comment|remark|obs|备注|^$/i.test(column.heading) ? text : `${column.heading}: ${text}`]
    })
}

/** A sheet's name that says nothing of its parts. */
const isPlainSheet = (sheet: string): boolean =>
  sheet === '' ||
  /^(sheet|tabelle|hoja|feuille|planilha|bom|parts( list)?|bill of materials)\s*\d*$/i.test(sheet)

/** Without the marks of footnotes; "mm²" keeps its square. */
const withoutMark = (text: string): string => text.replace(/(?<!\b[cdk]?m)[⁰¹²³⁴-⁹]+$/u, '').trim()

function withUnit(read: Quantity, typed: string, unit: string): Quantity {
  if (read.unit !== 'each') return read
  return quantityOf(`${read.value} ${unit}`) ?? { ...read, typed: `${typed} ${unit}`.slice(0, 60) }
}

const BETWEEN = /\s+(?:or|oder|ou|或)\s+|\s+alternatively\s+/i

/** "MT3608 or TPS61023" → both. "or larger", "or similar" is no other part. */
export function alternatives(text: string): string[] {
  const parts = text.split(BETWEEN).map((part) => part.trim())
  const isWhole = parts.every(
    (part) =>
      part.length >= 2 &&
      !/^(larger|smaller|better|more|less|longer|shorter|higher|similar|equivalent|equal|other|any|larger\b.*|similar\b.*|equivalent\b.*)$/i.test(
        part,
      ),
  )
  return isWhole ? parts : [text.trim()]
}

export const addressesIn = (cell: string): string[] => {
  const linked = [...cell.matchAll(/\[[^\]]*\]\(\s*<?([^)\s>]+)>?[^)]*\)/g)].map((match) => match[1]!)
  return linked.length > 0 ? linked : [...cell.matchAll(/https?:\/\/[^\s,;)"'<>]+/g)].map((match) => match[0])
}

const REGION =
  /\((US|EU|CN|UK|JP|IN|RMB|USD|EUR|CNY|GBP|美国|欧盟|欧洲|中国)\)|\b(US|EU|CN|UK|JP|RMB)$|\b(\d)$/i
const SAME_REGION: Record<string, string> = {
  RMB: 'CN',
  CNY: 'CN',
  USD: 'US',
  EUR: 'EU',
  GBP: 'UK',
  美国: 'US',
  欧盟: 'EU',
  欧洲: 'EU',
  中国: 'CN',
}

const regionOf = (heading: string): string => {
  const found = REGION.exec(heading.trim())
  const tag = (found?.[1] ?? found?.[2] ?? found?.[3] ?? '').toUpperCase()
  return SAME_REGION[tag] ?? tag
}

/** Price, shop and link of one region ("(EU)") or number ("Source 2") belong together. */
function sourcesOf(table: UnderstoodTable, row: UnderstoodRow, name: string): UnderstoodSource[] {
  const sources = new Map<string, UnderstoodSource>()
  for (const column of table.columns) {
    const cell = cellOf(row, column)
    const text = plainCell(cell)
    if (text === '' || /^[-–—]+$/.test(text) || !/^(price|link|supplier)$/.test(column.meaning)) continue
    const region = regionOf(column.heading)
    const source = sources.get(region) ?? {
      supplier: '',
      address: '',
      price: '',
      searchWords: name.slice(0, 300),
    }
    sources.set(region, source)
    if (column.meaning === 'price') source.price = withCurrency(text, column.heading).slice(0, 60)
    const address = webAddress(addressesIn(cell)[0])
    if (column.meaning !== 'price' && address !== '' && source.address === '') source.address = address
    const words = text.replace(/https?:\/\/\S+/g, '').trim()
    if (column.meaning !== 'price' && words !== '' && !/^todo$/i.test(words))
      source.supplier = source.supplier === '' ? words.slice(0, 300) : source.supplier
  }
  return [...sources.values()]
    .map((source) =>
      source.supplier === '' && source.address !== ''
        ? { ...source, supplier: hostOf(source.address) }
        : source,
    )
    .filter(({ supplier, address, price }) => supplier !== '' || address !== '' || price !== '')
    .slice(0, 30)
}

const hostOf = (address: string): string =>
  (/^https?:\/\/(?:www\.)?([^/:?#]+)/i.exec(address)?.[1] ?? '').slice(0, 300)

/** An address of the web that a guide can hold, else nothing. */
export function webAddress(text: string | undefined): string {
  if (text === undefined || text.length > 2000 || !/^https?:\/\//i.test(text)) return ''
  return URL.canParse(text) ? text : ''
}

/** "9.50" under "Price (€)" is "9.50 €": a number without its currency says nothing. */
function withCurrency(price: string, heading: string): string {
  if (/[€$£¥￥₹]|[A-Z]{3}/.test(price) || !/\d/.test(price)) return price
  const found = /[€$£¥￥₹]|\b(USD|EUR|GBP|SEK|RMB|CNY|JPY|INR|AUD|CAD|CHF|NOK|DKK)\b/i.exec(heading)?.[0]
  return found === undefined ? price : `${price} ${found.toUpperCase()}`
}
