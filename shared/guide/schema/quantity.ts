import { z } from 'zod'
import { UnitCode } from '../../lib/units/units'

/** A decimal as text, so that it is added and scaled exactly: "12", "0.2", "-3.50". No exponent, no binary float. */
export const Decimal = z.string().regex(/^-?\d{1,12}(\.\d{1,9})?$/, 'Write a number such as 12 or 0.5.')
export type Decimal = z.infer<typeof Decimal>

/** A decimal that is nought or more. */
export const Amount = z
  .string()
  .regex(/^\d{1,12}(\.\d{1,9})?$/, 'Write a number such as 12 or 0.5, not below nought.')

/** A value with its unit; `typed` keeps the form a person wrote ("1/2 in", "~8"). */
export const Quantity = z.object({
  value: Amount,
  unit: UnitCode,
  typed: z.string().max(60).optional(),
})
export type Quantity = z.infer<typeof Quantity>

/** A value that may be below nought, as in a temperature or a tolerance. */
export const Measure = z.object({ value: Decimal, unit: UnitCode, typed: z.string().max(60).optional() })
export type Measure = z.infer<typeof Measure>
