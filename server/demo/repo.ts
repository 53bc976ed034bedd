import type { Tx } from '../db/open'
import { guideMembers } from '../db/schema'

export function addMember(tx: Tx, row: typeof guideMembers.$inferInsert): void {
  tx.insert(guideMembers).values(row).onConflictDoNothing().run()
}
