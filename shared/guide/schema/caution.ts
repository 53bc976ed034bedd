import { z } from 'zod'
import { Id } from '../../lib/ids/id'
import { Condition } from './condition'
import { Sentences } from './text'

/** ISO 3864-2 and ANSI Z535.6, from the gravest down. */
export const SignalWord = z.enum(['danger', 'warning', 'caution', 'notice'])
export type SignalWord = z.infer<typeof SignalWord>

/** Protective equipment by the code of its mandatory sign, ISO 7010: "M004". */
export const WearCode = z.string().regex(/^M\d{3}$/, 'A mandatory sign of ISO 7010 has a code such as M004.')

/** A hazard said before the action that it concerns. */
export const Caution = z.object({
  id: Id,
  signal: SignalWord,
  hazard: Sentences,
  avoid: Sentences,
  wear: z.array(WearCode).max(12),
  when: Condition.optional(),
})
export type Caution = z.infer<typeof Caution>
