import type { Conflict } from '../../shared/guide/merge'
import { canonicalJson } from '../../shared/lib/json/hash'
import type { Context } from '../context'
import type { Tx } from '../db/open'
import { insertConflict, markSettled, readOpenConflicts } from './conflictRepo'

/**
 * Keeps the conflicts of a late save until somebody settles them. Somebody who goes on typing in a field that is in conflict, from
 * the same base, has one conflict there with the newest words, not one for each save.
 */
export function keepConflicts(
  tx: Tx,
  ctx: Context,
  guideId: string,
  conflicts: readonly { conflict: Conflict; mineBy: string; theirsBy: string | null }[],
): void {
  if (conflicts.length === 0) return
  const now = ctx.now()
  const open = readOpenConflicts(tx, guideId)
  for (const { conflict, mineBy, theirsBy } of conflicts) {
    const place = placeOf(conflict)
    for (const { row, conflict: earlier } of open) {
      if (row.mineBy === mineBy && placeOf(earlier) === place) markSettled(tx, row.id, now)
    }
    insertConflict(tx, {
      id: ctx.newId(),
      guideId,
      conflict: JSON.stringify(conflict),
      mineBy,
      theirsBy,
      createdAt: now,
    })
  }
}

const placeOf = ({ node, within, field, why, base }: Conflict): string =>
  canonicalJson([node, within ?? null, field, why, base ?? null])
