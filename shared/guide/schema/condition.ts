import { z } from 'zod'
import { Id } from '../../lib/ids/id'

/**
 * When a node is there: every clause must hold, and a clause holds when the option chosen for `line` is among `is`.
 * Absent means always. It is the only mechanism for what follows from a substitute (S1000D calls the idea applicability).
 */
export const Condition = z.array(z.object({ line: Id, is: z.array(Id).min(1).max(50) })).max(20)
export type Condition = z.infer<typeof Condition>
