import { eq, inArray } from 'drizzle-orm'
import type { Tx } from '../db/open'
import { assets, renditions } from '../db/schema'

export type AssetRow = typeof assets.$inferSelect
export type RenditionRow = typeof renditions.$inferSelect
export interface FileRow {
  asset: AssetRow
  renditions: RenditionRow[]
}

/** SQLite takes a limited number of values in one statement. */
const AT_ONCE = 500

/** Which of these hashes the site has files of. */
export function knownFiles(tx: Tx, hashes: readonly string[]): Set<string> {
  const found = inParts(hashes, (part) =>
    tx.select({ sha256: assets.sha256 }).from(assets).where(inArray(assets.sha256, part)).all(),
  )
  return new Set(found.map(({ sha256 }) => sha256))
}

/** The files of these hashes with what was made from them, in the order asked for; unknown ones are left out. */
export function readFiles(tx: Tx, hashes: readonly string[]): FileRow[] {
  const unique = [...new Set(hashes)]
  const rows = inParts(unique, (part) => tx.select().from(assets).where(inArray(assets.sha256, part)).all())
  const made = inParts(unique, (part) =>
    tx.select().from(renditions).where(inArray(renditions.sha256, part)).orderBy(renditions.name).all(),
  )
  const byHash = new Map(rows.map((asset) => [asset.sha256, asset]))
  return unique.flatMap((sha256) => {
    const asset = byHash.get(sha256)
    return asset === undefined
      ? []
      : [{ asset, renditions: made.filter((rendition) => rendition.sha256 === sha256) }]
  })
}

export function readFile(tx: Tx, sha256: string): AssetRow | undefined {
  return tx.select().from(assets).where(eq(assets.sha256, sha256)).get()
}

/** @returns false where the site has this file already. */
export function insertFile(tx: Tx, row: typeof assets.$inferInsert): boolean {
  return tx.insert(assets).values(row).onConflictDoNothing().run().changes > 0
}

export function setFileState(
  tx: Tx,
  sha256: string,
  change: Partial<Pick<AssetRow, 'state' | 'facts' | 'trouble'>>,
): void {
  tx.update(assets).set(change).where(eq(assets.sha256, sha256)).run()
}

export function putRendition(tx: Tx, row: RenditionRow): void {
  tx.insert(renditions)
    .values(row)
    .onConflictDoUpdate({ target: [renditions.sha256, renditions.name], set: row })
    .run()
}

export function readRendition(tx: Tx, sha256: string, name: string): RenditionRow | undefined {
  return readFiles(tx, [sha256])[0]?.renditions.find((rendition) => rendition.name === name)
}

function inParts<Found>(hashes: readonly string[], read: (part: string[]) => Found[]): Found[] {
  const found: Found[] = []
  for (let from = 0; from < hashes.length; from += AT_ONCE) {
    found.push(...read(hashes.slice(from, from + AT_ONCE)))
  }
  return found
}
