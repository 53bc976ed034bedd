import { setNode } from '../../../../shared/guide/edit'
import { parseQuantity, type QuantityTrouble } from '../../../../shared/guide/parseQuantity'
import {
  Amount,
  type GuideDocument,
  type Line,
  type LineKind,
  type Option,
} from '../../../../shared/guide/schema'
import type { Id } from '../../../../shared/lib/ids/id'
import { UNITS } from '../../../../shared/lib/units/units'
import { unitFor } from '../../../../shared/lib/units/unitFor'

/** The columns that can be written in, in their order. */
export const COLUMNS = [
  'kind',
  'name',
  'specification',
  'designation',
  'quantity',
  'unit',
  'spare',
  'note',
  'model',
] as const
export type Column = (typeof COLUMNS)[number]

/** Why a cell does not take what was written. */
export type CellTrouble =
  | QuantityTrouble
  | 'unknown kind'
  | 'no quantity'
  | 'not a percentage'
  | 'unknown model'
  | 'not printed'
  | 'too much text'

export type SetCell = { ok: true; document: GuideDocument } | { ok: false; why: CellTrouble }

/** The words for kinds in the person's language, to show them and to read them from what is pasted. */
export type KindWords = Record<LineKind, string>

const designers = (line: Line): Option => line.options[0]!

/** A cell as text: what it shows and what is copied from it. */
export function cellText(doc: GuideDocument, line: Line, column: Column, kinds: KindWords): string {
  const { part, print } = designers(line)
  switch (column) {
    case 'kind':
      return kinds[line.kind]
    case 'name':
      return part.name
    case 'specification':
      return part.specification
    case 'designation':
      return part.designation ?? ''
    case 'quantity':
      return line.quantity?.typed ?? line.quantity?.value ?? ''
    case 'unit':
      return line.quantity === null ? '' : unitWord(line.quantity.unit)
    case 'spare':
      return line.sparePercent ?? ''
    case 'note':
      return line.note
    case 'model':
      return doc.models.find(({ id }) => id === print?.model)?.name ?? ''
  }
}

/** A unit in a cell. Pieces are said, because an empty cell would be no unit. */
const unitWord = (unit: keyof typeof UNITS): string => UNITS[unit].symbol || unit

/** Writes text into a cell. @returns the reason where it does not fit, and then nothing has changed. */
export function setCell(
  doc: GuideDocument,
  lineId: Id,
  column: Column,
  written: string,
  kinds: KindWords,
): SetCell {
  const line = doc.lines.find(({ id }) => id === lineId)
  if (line === undefined) return { ok: true, document: doc }
  const text = clean(written, column)
  const set = (patch: Partial<Line>): SetCell => ({ ok: true, document: setNode(doc, 'line', lineId, patch) })
  const setOption = (patch: Partial<Option>): SetCell => ({
    ok: true,
    document: setNode(doc, 'option', designers(line).id, patch),
  })
  const setPart = (patch: Partial<Option['part']>): SetCell =>
    setOption({ part: withoutUndefined({ ...designers(line).part, ...patch }) })
  if (text.length > LONGEST[column]) return { ok: false, why: 'too much text' }
  // What says the same changes nothing: else every visit to a cell were a change.
  if (text === clean(cellText(doc, line, column, kinds), column)) return { ok: true, document: doc }
  switch (column) {
    case 'kind': {
      const kind = kindFor(text, kinds)
      return kind === undefined ? { ok: false, why: 'unknown kind' } : set({ kind })
    }
    case 'name':
      return setPart({ name: text })
    case 'specification':
      return setPart({ specification: text })
    case 'designation':
      return setPart({ designation: text === '' ? undefined : text })
    case 'quantity': {
      if (text === '') return set({ quantity: null })
      const parsed = parseQuantity(text, line.quantity?.unit ?? 'each')
      return parsed.ok ? set({ quantity: parsed.quantity }) : parsed
    }
    case 'unit': {
      const unit = unitFor(text)
      if (text === '' && line.quantity === null) return { ok: true, document: doc }
      if (unit === undefined) return { ok: false, why: 'unknown unit' }
      if (line.quantity === null) return { ok: false, why: 'no quantity' }
      return set({ quantity: { value: line.quantity.value, unit } })
    }
    case 'spare': {
      const percent = text.replace(/\s*[%٪]$/, '').replace(',', '.')
      if (percent === '') return set({ sparePercent: undefined })
      return Amount.safeParse(percent).success
        ? set({ sparePercent: percent })
        : { ok: false, why: 'not a percentage' }
    }
    case 'note':
      return set({ note: text })
    case 'model': {
      if (line.kind !== 'printed')
        return text === '' ? { ok: true, document: doc } : { ok: false, why: 'not printed' }
      const named = text.replace(/\.stl$/i, '').toLocaleLowerCase()
      const model = doc.models.find(({ id, name }) => id === text || name.toLocaleLowerCase() === named)
      if (text !== '' && model === undefined) return { ok: false, why: 'unknown model' }
      const print = designers(line).print ?? NO_PRINT
      return setOption({ print: { ...print, model: model?.id ?? null } })
    }
  }
}

const NO_PRINT = { model: null, material: '', layer: null, walls: null, infill: null, supports: null }

const LONGEST: Record<Column, number> = {
  kind: 300,
  name: 300,
  specification: 4000,
  designation: 300,
  quantity: 300,
  unit: 300,
  spare: 300,
  note: 4000,
  model: 300,
}

/** A line break is kept only where there is more than one line of text. */
function clean(text: string, column: Column): string {
  const whole = text.replace(/\p{Surrogate}/gu, '').trim()
  return column === 'specification' || column === 'note' ? whole : whole.replace(/\s*[\r\n\t]+\s*/g, ' ')
}

function withoutUndefined<T extends object>(value: T): T {
  return Object.fromEntries(Object.entries(value).filter(([, each]) => each !== undefined)) as T
}

/** Kinds by their code, by the person's word, and by what lists in the trade call them. */
function kindFor(text: string, kinds: KindWords): LineKind | undefined {
  const word = text.toLocaleLowerCase()
  const own = (Object.keys(kinds) as LineKind[]).find(
    (kind) => kind === word || kinds[kind].toLocaleLowerCase() === word,
  )
  return own ?? ALSO[word]
}

const ALSO: Record<string, LineKind> = {
  buy: 'bought',
  purchased: 'bought',
  cots: 'bought',
  hardware: 'bought',
  print: 'printed',
  '3d printed': 'printed',
  '3d print': 'printed',
  'cut to length': 'cut',
  stock: 'cut',
  make: 'made',
  fabricated: 'made',
  assembly: 'made',
  consumables: 'consumable',
}
