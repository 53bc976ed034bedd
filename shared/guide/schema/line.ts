import { z } from 'zod'
import { Id } from '../../lib/ids/id'
import { Condition } from './condition'
import { Amount, Quantity } from './quantity'
import { Line1, Sentences } from './text'

export const LineKind = z.enum(['bought', 'printed', 'cut', 'made', 'consumable'])
export type LineKind = z.infer<typeof LineKind>

/** What a part is, so that it can be found without any link. `key` names it across guides and is empty until the catalogue gives one. */
export const Part = z.object({
  key: z.string().max(80),
  name: Line1,
  specification: Sentences,
  designation: Line1.optional(),
  mass: Quantity.optional(),
})
export type Part = z.infer<typeof Part>

/** Where the designer found a part, in the designer's words and undated. Priced offers belong to the site, not to the guide. */
export const Source = z.object({
  id: Id,
  supplier: Line1,
  address: z.union([z.literal(''), z.url({ protocol: /^https?$/ }).max(2000)]),
  price: z.string().max(60),
  searchWords: Line1,
})
export type Source = z.infer<typeof Source>

/** One part that fills a line. The first option is the designer's, the others are substitutes. */
export const Option = z.object({
  id: Id,
  part: Part,
  /** ISO 3166 or UN M.49 codes; an empty list means everywhere. */
  regions: z.array(z.string().regex(/^[A-Z]{2}$|^\d{3}$/)).max(250),
  requires: z.array(Id).max(50),
  excludes: z.array(Id).max(50),
  sources: z.array(Source).max(30),
  cut: z.object({ profile: Line1, length: Quantity, angles: Line1.optional() }).optional(),
  print: z
    .object({
      model: Id.nullable(),
      material: Line1,
      layer: Quantity.nullable(),
      walls: z.number().int().min(0).max(100).nullable(),
      infill: z.number().int().min(0).max(100).nullable(),
      supports: z.boolean().nullable(),
    })
    .optional(),
})
export type Option = z.infer<typeof Option>

/**
 * One need of the machine. `quantity` null says "as needed". `sparePercent` is what to buy beyond what the steps use.
 * `within` nests a line in a sub-assembly's line. `within` and `when` never make a line appear twice: balloons count lines.
 */
export const Line = z.object({
  id: Id,
  kind: LineKind,
  quantity: Quantity.nullable(),
  sparePercent: Amount.optional(),
  note: Sentences,
  within: Id.optional(),
  when: Condition.optional(),
  options: z.array(Option).min(1).max(30),
})
export type Line = z.infer<typeof Line>
