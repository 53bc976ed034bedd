import { z } from 'zod'
import { LineKind, Quantity, RichText, SignalWord } from '../guide/schema'
import { Sha256 } from '../lib/json/hash'

/** What a column of a parts table holds. `ignore` is what a person chooses for a column that is not wanted. */
export const ColumnMeaning = z.enum([
  'quantity',
  'name',
  'specification',
  'note',
  'link',
  'reference',
  'price',
  'supplier',
  'partNumber',
  'total',
  'substitute',
  'unit',
  'group',
  'pack',
  'picture',
  'level',
  'ignore',
])
export type ColumnMeaning = z.infer<typeof ColumnMeaning>

/** Names a piece of an understanding while it is looked at: "line-12". Nothing of a guide; ids are made on taking. */
const Key = z.string().min(1).max(60)
const Short = z.string().max(300)
const Long = z.string().max(4000)
/** A place among the files that were brought, with `/` between folders: "docs/build.md". An address for what is remote. */
const Path = z.string().max(2000)

export const UnderstoodFigure = z.object({
  key: Key,
  path: Path,
  alt: Long,
  caption: Long,
  sha256: Sha256.nullable(),
  /** `missing`: the text names a file that was not brought. `remote`: it lies elsewhere and is not fetched. */
  state: z.enum(['found', 'missing', 'remote']),
  include: z.boolean(),
})
export type UnderstoodFigure = z.infer<typeof UnderstoodFigure>

/** A part that a step takes in hand. `sentence` is where a quantity was read from running text: those are offered, not included. */
export const UnderstoodUse = z.object({
  key: Key,
  lineKey: Key,
  typed: z.string().max(200),
  quantity: Quantity.nullable(),
  sentence: Long.nullable(),
  include: z.boolean(),
})
export type UnderstoodUse = z.infer<typeof UnderstoodUse>

export const UnderstoodCaution = z.object({ key: Key, signal: SignalWord, text: Long, include: z.boolean() })
export type UnderstoodCaution = z.infer<typeof UnderstoodCaution>

/** `body` has placeholder ids, made anew on taking. */
export const UnderstoodStep = z.object({
  key: Key,
  title: Short,
  include: z.boolean(),
  body: RichText,
  minutes: z.number().int().min(0).max(100000).nullable(),
  figures: z.array(UnderstoodFigure).max(100),
  uses: z.array(UnderstoodUse).max(200),
  cautions: z.array(UnderstoodCaution).max(20),
})
export type UnderstoodStep = z.infer<typeof UnderstoodStep>

export const UnderstoodSection = z.object({
  key: Key,
  title: Short,
  from: Path,
  include: z.boolean(),
  steps: z.array(UnderstoodStep).max(500),
})
export type UnderstoodSection = z.infer<typeof UnderstoodSection>

/** `cells` as typed, one for each column. `problem` is a sentence about this row, shown in its place. */
export const UnderstoodRow = z.object({
  key: Key,
  cells: z.array(Long).max(200),
  kind: z.enum(['line', 'section', 'total', 'heading', 'empty', 'note']),
  problem: z.string().max(500).nullable(),
  include: z.boolean(),
})
export type UnderstoodRow = z.infer<typeof UnderstoodRow>

export const UnderstoodColumn = z.object({
  index: z.number().int().min(0).max(199),
  heading: Short,
  meaning: ColumnMeaning,
})
export type UnderstoodColumn = z.infer<typeof UnderstoodColumn>

/** `headingRow` counts rows from nought; null where the table has no headings. `sheet` is a sheet's name, or the heading above a table. */
export const UnderstoodTable = z.object({
  key: Key,
  from: Path,
  sheet: Short,
  headingRow: z.number().int().min(0).nullable(),
  columns: z.array(UnderstoodColumn).max(200),
  rows: z.array(UnderstoodRow).max(3000),
  include: z.boolean(),
})
export type UnderstoodTable = z.infer<typeof UnderstoodTable>

export const UnderstoodSource = z.object({
  supplier: Short,
  address: z.string().max(2000),
  price: z.string().max(60),
  searchWords: Short,
})
export type UnderstoodSource = z.infer<typeof UnderstoodSource>

/**
 * A line of the parts list to be. `typed` is the quantity as it stands in the file; a null `quantity` with `asNeeded` false is one that
 * could not be read, which a person must fill in. `tableKey` is null for what was read from the text.
 */
export const UnderstoodLine = z.object({
  key: Key,
  name: Short,
  specification: Long,
  designation: Short,
  kind: LineKind,
  quantity: Quantity.nullable(),
  asNeeded: z.boolean(),
  typed: z.string().max(200),
  note: Long,
  sources: z.array(UnderstoodSource).max(30),
  substitutes: z.array(Short).max(29),
  modelKey: Key.nullable(),
  tableKey: Key.nullable(),
  include: z.boolean(),
})
export type UnderstoodLine = z.infer<typeof UnderstoodLine>

export const UnderstoodTool = z.object({ key: Key, name: Short, include: z.boolean() })
export type UnderstoodTool = z.infer<typeof UnderstoodTool>

/** A solid that was brought. `number` is how many to print, where the file's name says so ("clip-x2.stl"). */
export const UnderstoodModel = z.object({
  key: Key,
  path: Path,
  name: Short,
  sha256: Sha256.nullable(),
  lineKey: Key.nullable(),
  number: z.number().int().min(1).max(10000).nullable(),
  include: z.boolean(),
})
export type UnderstoodModel = z.infer<typeof UnderstoodModel>

/** What was understood of the files, for a person to look over and correct before anything becomes a guide. */
export const Understanding = z.object({
  title: Short,
  lang: z.string().max(35),
  licence: z.string().max(80),
  summary: Long,
  sections: z.array(UnderstoodSection).max(200),
  tables: z.array(UnderstoodTable).max(200),
  lines: z.array(UnderstoodLine).max(2000),
  models: z.array(UnderstoodModel).max(1000),
  tools: z.array(UnderstoodTool).max(500),
  /** Everything that did not become part of the above, and why. Nothing is dropped silently. */
  unused: z.array(z.object({ what: Long, where: Path, why: Long })).max(10000),
  /** Places where the design offers alternatives, which a person may turn into substitutes and conditions. */
  choices: z.array(z.object({ what: Long, where: Path })).max(1000),
})
export type Understanding = z.infer<typeof Understanding>
