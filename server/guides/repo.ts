import { and, desc, eq, gt, lt, lte, max, notInArray, or, sql } from 'drizzle-orm'
import type { GuideRole } from '../../shared/access/ability'
import { SCHEMA_VERSION, type GuideDocument } from '../../shared/guide/schema'
import { readDocument as upgrade } from '../../shared/guide/upgrade'
import { canonicalJson, hashOf } from '../../shared/lib/json/hash'
import type { Tx } from '../db/open'
import { documents, draftStates, drafts, guideMembers, guides, revisions, users } from '../db/schema'

export type GuideRow = typeof guides.$inferSelect
export type DraftRow = typeof drafts.$inferSelect
export type DraftStateRow = typeof draftStates.$inferSelect
export type RevisionRow = typeof revisions.$inferSelect

/** Stores a document once, by the hash of its canonical JSON. @returns the hash. */
export function insertDocument(tx: Tx, document: GuideDocument, now: Date): string {
  const hash = hashOf(document)
  tx.insert(documents)
    .values({ hash, json: canonicalJson(document), createdAt: now })
    .onConflictDoNothing()
    .run()
  return hash
}

/**
 * What is stored was checked when it came in; a document of an older version is brought up to this one.
 * @throws Error for a hash that is not stored, and for a document of a later program: both a fault of the site.
 */
export function readDocument(tx: Tx, hash: string): GuideDocument {
  const row = tx.select({ json: documents.json }).from(documents).where(eq(documents.hash, hash)).get()
  if (row === undefined) throw new Error(`There is no document ${hash}`)
  const stored = JSON.parse(row.json) as GuideDocument
  if (stored.schema === SCHEMA_VERSION) return stored
  const read = upgrade(stored)
  if (!read.ok) throw new Error(`Document ${hash} cannot be read: ${read.why}`)
  return read.document
}

export function readGuide(tx: Tx, guideId: string): GuideRow | undefined {
  return tx.select().from(guides).where(eq(guides.id, guideId)).get()
}

/** The slug, or the slug with the first number from 2 up that no other guide has. */
export function freeSlug(tx: Tx, wanted: string, ownId: string | null = null): string {
  for (let number = 1; ; number += 1) {
    const slug = number === 1 ? wanted : `${wanted}-${number}`
    const holder = tx.select({ id: guides.id }).from(guides).where(eq(guides.slug, slug)).get()
    if (holder === undefined || holder.id === ownId) return slug
  }
}

export function insertGuide(tx: Tx, guide: GuideRow, ownerId: string): void {
  tx.insert(guides).values(guide).run()
  tx.insert(guideMembers)
    .values({ guideId: guide.id, userId: ownerId, role: 'owner', createdAt: guide.createdAt })
    .run()
}

export function setSlug(tx: Tx, guideId: string, slug: string): void {
  tx.update(guides).set({ slug }).where(eq(guides.id, guideId)).run()
}

export function readDraft(tx: Tx, guideId: string): DraftRow | undefined {
  return tx.select().from(drafts).where(eq(drafts.guideId, guideId)).get()
}

/** Puts a state into the draft and at the end of its history. */
export function putDraft(tx: Tx, draft: DraftRow): void {
  const { guideId, documentHash, version, updatedBy, updatedAt } = draft
  tx.insert(drafts).values(draft).onConflictDoUpdate({ target: drafts.guideId, set: draft }).run()
  tx.insert(draftStates)
    .values({ guideId, version, documentHash, savedBy: updatedBy, savedAt: updatedAt })
    .run()
}

/**
 * The state of a draft at this version. Where it has been thinned out of the history, the last one before it: merging from an older
 * base finds more conflicts and loses nothing.
 */
export function readDraftState(tx: Tx, guideId: string, version: number): DraftStateRow | undefined {
  return tx
    .select()
    .from(draftStates)
    .where(and(eq(draftStates.guideId, guideId), lte(draftStates.version, version)))
    .orderBy(desc(draftStates.version))
    .limit(1)
    .get()
}

/** The states of a draft from the newest down to the one after `version`. */
export function readStatesAfter(tx: Tx, guideId: string, version: number, limit: number): DraftStateRow[] {
  return tx
    .select()
    .from(draftStates)
    .where(and(eq(draftStates.guideId, guideId), gt(draftStates.version, version)))
    .orderBy(desc(draftStates.version))
    .limit(limit)
    .all()
}

export function latestRevision(tx: Tx, guideId: string): RevisionRow | undefined {
  return tx
    .select()
    .from(revisions)
    .where(eq(revisions.guideId, guideId))
    .orderBy(desc(revisions.number))
    .limit(1)
    .get()
}

/** A guide as it is listed for those who work on it. */
export interface GuideEntryRow {
  guide: GuideRow
  title: string
  version: number
  updatedAt: Date
  updatedByName: string | null
  latest: { label: string; publishedAt: Date } | null
}

const entryColumns = {
  guide: guides,
  title: sql<string>`json_extract(${documents.json}, '$.title')`,
  version: drafts.version,
  updatedAt: drafts.updatedAt,
  updatedByName: users.name,
}

export function readGuideEntry(tx: Tx, guideId: string): GuideEntryRow | undefined {
  const row = tx
    .select(entryColumns)
    .from(guides)
    .innerJoin(drafts, eq(drafts.guideId, guides.id))
    .innerJoin(documents, eq(documents.hash, drafts.documentHash))
    .leftJoin(users, eq(users.id, drafts.updatedBy))
    .where(eq(guides.id, guideId))
    .get()
  return row === undefined ? undefined : { ...row, latest: latestOf(tx, guideId) }
}

/** The guides on which somebody has a role, the last changed first, from after a place in that order. */
export function guideEntriesOf(
  tx: Tx,
  userId: string,
  limit: number,
  after: { at: Date; id: string } | null,
): GuideEntryRow[] {
  const rows = tx
    .selectDistinct(entryColumns)
    .from(guideMembers)
    .innerJoin(guides, eq(guides.id, guideMembers.guideId))
    .innerJoin(drafts, eq(drafts.guideId, guides.id))
    .innerJoin(documents, eq(documents.hash, drafts.documentHash))
    .leftJoin(users, eq(users.id, drafts.updatedBy))
    .where(
      and(
        eq(guideMembers.userId, userId),
        after === null
          ? undefined
          : or(lt(drafts.updatedAt, after.at), and(eq(drafts.updatedAt, after.at), lt(guides.id, after.id))),
      ),
    )
    .orderBy(desc(drafts.updatedAt), desc(guides.id))
    .limit(limit)
    .all()
  return rows.map((row) => ({ ...row, latest: latestOf(tx, row.guide.id) }))
}

function latestOf(tx: Tx, guideId: string): GuideEntryRow['latest'] {
  const revision = latestRevision(tx, guideId)
  return revision === undefined ? null : { label: revision.label, publishedAt: revision.publishedAt }
}

/** The roles that somebody holds on a guide, each once. */
export function rolesOn(tx: Tx, guideId: string, userId: string): GuideRole[] {
  const rows = tx
    .selectDistinct({ role: guideMembers.role })
    .from(guideMembers)
    .where(and(eq(guideMembers.guideId, guideId), eq(guideMembers.userId, userId)))
    .all()
  return rows.map(({ role }) => role)
}

/**
 * Thins a draft's history: of the states saved before a time the last one of each hour stays, and the draft's own.
 * Documents that nothing else refers to go with the others.
 */
export function thinDraftStates(tx: Tx, guideId: string, before: Date): void {
  const kept = tx
    .select({ version: max(draftStates.version) })
    .from(draftStates)
    .where(eq(draftStates.guideId, guideId))
    .groupBy(sql`${draftStates.savedAt} / 3600000`)
  const gone = tx
    .delete(draftStates)
    .where(
      and(
        eq(draftStates.guideId, guideId),
        lt(draftStates.savedAt, before),
        notInArray(draftStates.version, kept),
        sql`${draftStates.version} <> (select version from draft where guide_id = ${guideId})`,
      ),
    )
    .returning({ hash: draftStates.documentHash })
    .all()
  for (const hash of new Set(gone.map((row) => row.hash))) dropDocument(tx, hash)
}

/** Removes a guide that was never published, its draft with all history, and the documents that nothing else refers to. */
export function deleteGuide(tx: Tx, guideId: string): void {
  const hashes = tx
    .selectDistinct({ hash: draftStates.documentHash })
    .from(draftStates)
    .where(eq(draftStates.guideId, guideId))
    .all()
  tx.delete(guides).where(eq(guides.id, guideId)).run()
  for (const { hash } of hashes) dropDocument(tx, hash)
}

function dropDocument(tx: Tx, hash: string): void {
  tx.delete(documents)
    .where(
      and(
        eq(documents.hash, hash),
        sql`not exists (select 1 from draft_state where document_hash = ${hash})`,
        sql`not exists (select 1 from draft where document_hash = ${hash})`,
        sql`not exists (select 1 from revision where document_hash = ${hash})`,
      ),
    )
    .run()
}
