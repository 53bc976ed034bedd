import { z } from 'zod'
import { Id } from '../../lib/ids/id'
import { Sha256 } from '../../lib/json/hash'
import { UnitCode } from '../../lib/units/units'
import { Condition } from './condition'
import { Decimal, Measure } from './quantity'
import { Line1, Sentences } from './text'

/** A place on a picture in hundredths of a per cent from its upper left corner: integers, so that a document holds no floats. */
export const Place = z.object({
  x: z.number().int().min(0).max(10000),
  y: z.number().int().min(0).max(10000),
})
export type Place = z.infer<typeof Place>

const onPicture = {
  id: Id,
  /** Where the mark stands; null until it has been placed. */
  at: Place.nullable(),
  text: Line1.optional(),
  when: Condition.optional(),
}

/** A mark over a picture, drawn as text and vectors. `tip` is where its leader or arrow ends. */
export const Callout = z.discriminatedUnion('shape', [
  z.object({ ...onPicture, shape: z.literal('balloon'), line: Id, tip: Place.nullable() }),
  z.object({ ...onPicture, shape: z.literal('arrow'), tip: Place.nullable() }),
  z.object({ ...onPicture, shape: z.literal('dimension'), tip: Place.nullable(), value: Measure }),
  z.object({ ...onPicture, shape: z.literal('area'), tip: Place.nullable() }),
])
export type Callout = z.infer<typeof Callout>

/** A photo, a view rendered from a model, or a clip. `asset` is null until a picture has been put in. */
export const Figure = z.object({
  id: Id,
  kind: z.enum(['photo', 'view', 'clip']),
  asset: Sha256.nullable(),
  model: Id.optional(),
  caption: Sentences,
  alt: Sentences,
  callouts: z.array(Callout).max(100),
  when: Condition.optional(),
})
export type Figure = z.infer<typeof Figure>

/** A printable or cuttable solid. `unit` is the length that the numbers of the STL stand for; an STL itself does not say. */
export const Model = z.object({
  id: Id,
  asset: Sha256,
  name: Line1,
  unit: z.enum(['mm', 'cm', 'm', 'in']),
  material: Line1,
})
export type Model = z.infer<typeof Model>

/** A file that the document refers to, by the hash of its bytes. */
export const Asset = z.object({
  sha256: Sha256,
  mediaType: z.string().max(100),
  bytes: z.number().int().min(0),
  name: z.string().max(300),
})
export type Asset = z.infer<typeof Asset>

/** What the machine is said to do, and what shows it. */
export const Claim = z.object({
  id: Id,
  label: Line1,
  quantity: z.object({ value: Decimal, unit: UnitCode, uncertainty: Decimal.optional() }),
  conditions: Line1,
  evidence: z.discriminatedUnion('kind', [
    z.object({ kind: z.literal('bench run'), text: Sentences }),
    z.object({ kind: z.literal('formula'), text: Sentences }),
    z.object({ kind: z.literal('source'), text: Sentences }),
    z.object({ kind: z.literal('none') }),
  ]),
  when: Condition.optional(),
})
export type Claim = z.infer<typeof Claim>

const Symbol1 = z
  .string()
  .regex(/^[A-Za-z][A-Za-z0-9_]{0,30}$/, 'A symbol is a letter followed by letters or digits.')

/** A formula sheet that a reader fills in for the place. */
export const Sheet = z.object({
  id: Id,
  title: Line1,
  inputs: z
    .array(z.object({ id: Id, symbol: Symbol1, label: Line1, unit: UnitCode, typical: Decimal.optional() }))
    .max(50),
  formulas: z
    .array(
      z.object({
        id: Id,
        symbol: Symbol1,
        expression: z.string().max(500),
        unit: UnitCode,
        when: Condition.optional(),
      }),
    )
    .max(50),
  results: z.array(z.object({ id: Id, symbol: Symbol1, label: Line1, assumption: Sentences })).max(50),
})
export type Sheet = z.infer<typeof Sheet>
