import { and, asc, eq, inArray, isNull } from 'drizzle-orm'
import type { Conflict } from '../../shared/guide/merge'
import type { Tx } from '../db/open'
import { draftConflicts, users } from '../db/schema'

type ConflictRow = typeof draftConflicts.$inferSelect

/** A conflict that nobody has settled yet, with the names of the two. */
export interface OpenConflict {
  row: ConflictRow
  conflict: Conflict
  mineByName: string | null
  theirsByName: string | null
}

export function insertConflict(tx: Tx, row: Omit<ConflictRow, 'settledAt'>): void {
  tx.insert(draftConflicts).values(row).run()
}

export function readOpenConflicts(tx: Tx, guideId: string): OpenConflict[] {
  const rows = tx
    .select()
    .from(draftConflicts)
    .where(and(eq(draftConflicts.guideId, guideId), isNull(draftConflicts.settledAt)))
    .orderBy(asc(draftConflicts.createdAt), asc(draftConflicts.id))
    .all()
  const people = rows.flatMap((row) => [row.mineBy, row.theirsBy]).filter((id) => id !== null)
  const named = tx
    .select({ id: users.id, name: users.name })
    .from(users)
    .where(inArray(users.id, [...new Set(people)]))
    .all()
  const nameOf = (id: string | null): string | null => named.find((user) => user.id === id)?.name ?? null
  return rows.map((row) => ({
    row,
    conflict: JSON.parse(row.conflict) as Conflict,
    mineByName: nameOf(row.mineBy),
    theirsByName: nameOf(row.theirsBy),
  }))
}

export function markSettled(tx: Tx, conflictId: string, now: Date): void {
  tx.update(draftConflicts).set({ settledAt: now }).where(eq(draftConflicts.id, conflictId)).run()
}
