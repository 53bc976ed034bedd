import { eq } from 'drizzle-orm'
import type { Tx } from '../../db/open'
import { imports } from '../../db/schema'

export type ImportRow = typeof imports.$inferSelect

export function insertImport(tx: Tx, row: typeof imports.$inferInsert): void {
  tx.insert(imports).values(row).run()
}

export function readImport(tx: Tx, id: string): ImportRow | undefined {
  return tx.select().from(imports).where(eq(imports.id, id)).get()
}

export function setImport(
  tx: Tx,
  id: string,
  patch: Partial<Pick<ImportRow, 'state' | 'understanding' | 'trouble' | 'guideId' | 'updatedAt'>>,
): void {
  tx.update(imports).set(patch).where(eq(imports.id, id)).run()
}

export function deleteImport(tx: Tx, id: string): void {
  tx.delete(imports).where(eq(imports.id, id)).run()
}
