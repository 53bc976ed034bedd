import { and, desc, eq, lt, sql } from 'drizzle-orm'
import type { GuideDocument } from '../../shared/guide/schema'
import { cutWords, searchWords } from '../../shared/guide/searchWords'
import type { Tx } from '../db/open'
import { revisions } from '../db/schema'
import type { RevisionRow } from './repo'

/** The only write to this table: a revision is never updated and never deleted. */
export function insertRevision(tx: Tx, row: RevisionRow): void {
  tx.insert(revisions).values(row).run()
}

export function readRevision(tx: Tx, id: string): RevisionRow | undefined {
  return tx.select().from(revisions).where(eq(revisions.id, id)).get()
}

/** The label as it stands, should the guide have one that differs in the size of letters alone. */
export function takenLabel(tx: Tx, guideId: string, label: string): string | undefined {
  const wanted = label.toLowerCase()
  const rows = tx
    .select({ label: revisions.label })
    .from(revisions)
    .where(eq(revisions.guideId, guideId))
    .all()
  return rows.find((row) => row.label.toLowerCase() === wanted)?.label
}

/** Newest first, from below a number. */
export function revisionsOf(
  tx: Tx,
  guideId: string,
  limit: number,
  below: number | undefined,
): RevisionRow[] {
  return tx
    .select()
    .from(revisions)
    .where(and(eq(revisions.guideId, guideId), below === undefined ? undefined : lt(revisions.number, below)))
    .orderBy(desc(revisions.number))
    .limit(limit)
    .all()
}

/** What is found of a guide is its latest revision, cut into words as a question is, so that scripts without spaces are found too. */
export function putSearch(tx: Tx, guideId: string, document: GuideDocument): void {
  const title = cutWords(document.title, document.lang)
  const summary = cutWords(document.summary, document.lang)
  tx.run(sql`delete from guide_search where guide_id = ${guideId}`)
  tx.run(
    sql`insert into guide_search (guide_id, title, summary, words) values (${guideId}, ${title}, ${summary}, ${searchWords(document)})`,
  )
}
