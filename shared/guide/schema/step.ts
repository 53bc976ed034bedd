import { z } from 'zod'
import { Id } from '../../lib/ids/id'
import { UnitCode } from '../../lib/units/units'
import { Caution } from './caution'
import { Condition } from './condition'
import { Decimal, Quantity } from './quantity'
import { Line1, RichText, Sentences } from './text'

/** A part taken in hand in a step. A quantity of null says "as needed", for consumables. */
export const Use = z.object({ id: Id, line: Id, quantity: Quantity.nullable(), when: Condition.optional() })
export type Use = z.infer<typeof Use>

/** A thing to verify. `measure` is null where it is seen, not measured; a null limit must be meant: then `oneSided` is true. */
export const Check = z.object({
  id: Id,
  text: Sentences,
  measure: z
    .object({
      unit: UnitCode,
      atLeast: Decimal.nullable(),
      atMost: Decimal.nullable(),
      oneSided: z.boolean(),
    })
    .nullable(),
  otherwise: Sentences.optional(),
  when: Condition.optional(),
})
export type Check = z.infer<typeof Check>

/** `tools`, `figures` and `models` are ids of the document's lists, in the order shown. */
export const Step = z.object({
  id: Id,
  title: Line1,
  when: Condition.optional(),
  body: RichText,
  uses: z.array(Use).max(200),
  tools: z.array(Id).max(100),
  cautions: z.array(Caution).max(20),
  checks: z.array(Check).max(50),
  figures: z.array(Id).max(100),
  models: z.array(Id).max(100),
  minutes: z.number().int().min(0).max(100000).nullable(),
  people: z.number().int().min(1).max(100),
})
export type Step = z.infer<typeof Step>

export const Section = z.object({ id: Id, title: Line1, steps: z.array(Step).max(500) })
export type Section = z.infer<typeof Section>

export const Tool = z.object({ id: Id, name: Line1, note: Line1.optional(), when: Condition.optional() })
export type Tool = z.infer<typeof Tool>
