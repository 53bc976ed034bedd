import { and, asc, count, desc, eq, gt, inArray, like, ne } from 'drizzle-orm'
import { DEMO_DOMAIN } from '../../../shared/access/demoAddress'
import type { Tx } from '../../db/open'
import {
  assets,
  documents,
  drafts,
  draftStates,
  guideMembers,
  guides,
  revisions,
  sessions,
  users,
} from '../../db/schema'

export type SessionRow = typeof sessions.$inferSelect

export function changeOwn(
  tx: Tx,
  userId: string,
  change: { name?: string; language?: string },
  updatedAt: Date,
): void {
  tx.update(users)
    .set({ ...change, updatedAt })
    .where(eq(users.id, userId))
    .run()
}

export function listSessions(tx: Tx, userId: string, now: Date): SessionRow[] {
  return tx
    .select()
    .from(sessions)
    .where(and(eq(sessions.userId, userId), gt(sessions.expiresAt, now)))
    .orderBy(desc(sessions.updatedAt))
    .all()
}

export function readSession(tx: Tx, userId: string, id: string): SessionRow | undefined {
  return tx
    .select()
    .from(sessions)
    .where(and(eq(sessions.userId, userId), eq(sessions.id, id)))
    .get()
}

export function listDemoAccounts(tx: Tx): Pick<typeof users.$inferSelect, 'name' | 'email' | 'role'>[] {
  return tx
    .select({ name: users.name, email: users.email, role: users.role })
    .from(users)
    .where(like(users.email, `%@${DEMO_DOMAIN}`))
    .orderBy(asc(users.createdAt), asc(users.name))
    .all()
}

export interface OwnedGuide {
  id: string
  slug: string
  byline: string
  json: string
}

/** The guides on which somebody has this role, with the document of their draft. */
export function listGuidesOf(tx: Tx, userId: string, role?: 'owner'): OwnedGuide[] {
  return tx
    .selectDistinct({ id: guides.id, slug: guides.slug, byline: guides.byline, json: documents.json })
    .from(guideMembers)
    .innerJoin(guides, eq(guides.id, guideMembers.guideId))
    .innerJoin(drafts, eq(drafts.guideId, guides.id))
    .innerJoin(documents, eq(documents.hash, drafts.documentHash))
    .where(and(eq(guideMembers.userId, userId), role === undefined ? undefined : eq(guideMembers.role, role)))
    .orderBy(asc(guides.slug))
    .all()
}

/** Who else works on a guide. A person with several roles is there several times. */
export function listOthers(tx: Tx, guideId: string, userId: string) {
  return tx
    .select({ userId: users.id, name: users.name, role: guideMembers.role })
    .from(guideMembers)
    .innerJoin(users, eq(users.id, guideMembers.userId))
    .where(and(eq(guideMembers.guideId, guideId), ne(guideMembers.userId, userId)))
    .orderBy(asc(users.name))
    .all()
}

export function countRevisions(tx: Tx, guideId: string): number {
  return tx.select({ n: count() }).from(revisions).where(eq(revisions.guideId, guideId)).get()?.n ?? 0
}

export function countPublishedBy(tx: Tx, userId: string): number {
  return tx.select({ n: count() }).from(revisions).where(eq(revisions.publishedBy, userId)).get()?.n ?? 0
}

export function listRevisionsBy(tx: Tx, userId: string) {
  return tx
    .select({ revision: revisions, slug: guides.slug, json: documents.json })
    .from(revisions)
    .innerJoin(guides, eq(guides.id, revisions.guideId))
    .innerJoin(documents, eq(documents.hash, revisions.documentHash))
    .where(eq(revisions.publishedBy, userId))
    .orderBy(asc(guides.slug), asc(revisions.number))
    .all()
}

export function listSavedBy(tx: Tx, userId: string) {
  return tx
    .select({ slug: guides.slug, version: draftStates.version, savedAt: draftStates.savedAt })
    .from(draftStates)
    .innerJoin(guides, eq(guides.id, draftStates.guideId))
    .where(eq(draftStates.savedBy, userId))
    .orderBy(asc(guides.slug), asc(draftStates.version))
    .all()
}

export function listUploadsBy(tx: Tx, userId: string) {
  return tx.select().from(assets).where(eq(assets.uploadedBy, userId)).orderBy(asc(assets.createdAt)).all()
}

export function makeOwner(tx: Tx, guideId: string, userId: string, now: Date): void {
  tx.insert(guideMembers)
    .values({ guideId, userId, role: 'owner', language: '', createdAt: now })
    .onConflictDoNothing()
    .run()
}

export function setByline(tx: Tx, guideIds: string[], from: string, to: string): void {
  if (guideIds.length === 0) return
  tx.update(guides)
    .set({ byline: to })
    .where(and(inArray(guides.id, guideIds), eq(guides.byline, from)))
    .run()
}

export function deleteGuide(tx: Tx, guideId: string): void {
  tx.delete(guides).where(eq(guides.id, guideId)).run()
}

/** The one change that a revision ever sees: who published it is no longer named. */
export function forgetAuthor(tx: Tx, userId: string, formerMember: string): void {
  tx.update(revisions).set({ publishedByName: formerMember }).where(eq(revisions.publishedBy, userId)).run()
}

/** Sessions, ways to sign in and roles go with the row; what was written loses only the reference. */
export function deleteUser(tx: Tx, userId: string): void {
  tx.delete(users).where(eq(users.id, userId)).run()
}

/** Whether there is somebody else on the site, and another curator. */
export function countOthers(tx: Tx, userId: string): { people: number; curators: number } {
  const others = and(ne(users.id, userId), eq(users.emailVerified, true))
  const people = tx.select({ n: count() }).from(users).where(others).get()?.n ?? 0
  const curators =
    tx
      .select({ n: count() })
      .from(users)
      .where(and(others, eq(users.role, 'curator')))
      .get()?.n ?? 0
  return { people, curators }
}
