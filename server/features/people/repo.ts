import { and, asc, count, desc, eq, gt, isNull, lt, or, sql } from 'drizzle-orm'
import type { GuideRole, SiteRole } from '../../../shared/access/ability'
import type { RoleOnGuide } from '../../../shared/api/people'
import type { Tx } from '../../db/open'
import { documents, drafts, guideMembers, invitations, users } from '../../db/schema'

export type InvitationRow = typeof invitations.$inferSelect

/** The draft's document, of which the title is needed. */
export function readDraftJson(tx: Tx, guideId: string): string | undefined {
  return tx
    .select({ json: documents.json })
    .from(drafts)
    .innerJoin(documents, eq(documents.hash, drafts.documentHash))
    .where(eq(drafts.guideId, guideId))
    .get()?.json
}

export interface MemberRow {
  userId: string
  name: string
  email: string
  role: GuideRole
  language: string
}

/** Everybody with a role on the guide, those who came first first; a person with two roles is there twice. */
export function listMembers(tx: Tx, guideId: string): MemberRow[] {
  return tx
    .select({
      userId: users.id,
      name: users.name,
      email: users.email,
      role: guideMembers.role,
      language: guideMembers.language,
    })
    .from(guideMembers)
    .innerJoin(users, eq(users.id, guideMembers.userId))
    .where(eq(guideMembers.guideId, guideId))
    .orderBy(asc(guideMembers.createdAt), asc(users.name), asc(guideMembers.role))
    .all()
}

const isRole = (guideId: string, userId: string, { role, language }: RoleOnGuide) =>
  and(
    eq(guideMembers.guideId, guideId),
    eq(guideMembers.userId, userId),
    eq(guideMembers.role, role),
    eq(guideMembers.language, language),
  )

export function hasRole(tx: Tx, guideId: string, userId: string, held: RoleOnGuide): boolean {
  return (
    tx
      .select({ n: count() })
      .from(guideMembers)
      .where(isRole(guideId, userId, held))
      .get()!.n > 0
  )
}

/** Having a role already is having it. */
export function addRole(tx: Tx, guideId: string, userId: string, held: RoleOnGuide, createdAt: Date): void {
  tx.insert(guideMembers)
    .values({ guideId, userId, ...held, createdAt })
    .onConflictDoNothing()
    .run()
}

export function removeRole(tx: Tx, guideId: string, userId: string, held: RoleOnGuide): void {
  tx.delete(guideMembers)
    .where(isRole(guideId, userId, held))
    .run()
}

/** @returns whether there was somebody to remove. */
export function removeMember(tx: Tx, guideId: string, userId: string): boolean {
  const { changes } = tx
    .delete(guideMembers)
    .where(and(eq(guideMembers.guideId, guideId), eq(guideMembers.userId, userId)))
    .run()
  return changes > 0
}

export function countOwners(tx: Tx, guideId: string): number {
  return tx
    .select({ n: count() })
    .from(guideMembers)
    .where(and(eq(guideMembers.guideId, guideId), eq(guideMembers.role, 'owner')))
    .get()!.n
}

export function insertInvitation(tx: Tx, row: typeof invitations.$inferInsert): void {
  tx.insert(invitations).values(row).run()
}

const isOpen = and(isNull(invitations.acceptedAt), isNull(invitations.withdrawnAt))

/** Neither accepted nor withdrawn; those that have run out are among them. */
export function listInvitations(tx: Tx, guideId: string): InvitationRow[] {
  return tx
    .select()
    .from(invitations)
    .where(and(eq(invitations.guideId, guideId), isOpen))
    .orderBy(asc(invitations.createdAt))
    .all()
}

export function readInvitationByHash(tx: Tx, tokenHash: string): InvitationRow | undefined {
  return tx.select().from(invitations).where(eq(invitations.tokenHash, tokenHash)).get()
}

/** @returns whether it was open until now. */
export function withdrawInvitation(tx: Tx, guideId: string, id: string, now: Date): boolean {
  const { changes } = tx
    .update(invitations)
    .set({ withdrawnAt: now })
    .where(and(eq(invitations.guideId, guideId), eq(invitations.id, id), isOpen))
    .run()
  return changes > 0
}

export function withdrawSame(tx: Tx, guideId: string, email: string, held: RoleOnGuide, now: Date): void {
  tx.update(invitations)
    .set({ withdrawnAt: now })
    .where(
      and(
        eq(invitations.guideId, guideId),
        eq(invitations.email, email),
        eq(invitations.role, held.role),
        eq(invitations.language, held.language),
        isOpen,
      ),
    )
    .run()
}

/** Marks it as accepted, once. @returns whether it was open and had not run out. */
export function takeInvitation(tx: Tx, id: string, now: Date): boolean {
  const { changes } = tx
    .update(invitations)
    .set({ acceptedAt: now })
    .where(and(eq(invitations.id, id), isOpen, gt(invitations.expiresAt, now)))
    .run()
  return changes > 0
}

export interface SitePersonRow {
  id: string
  name: string
  email: string
  role: SiteRole
  emailVerified: boolean
  createdAt: Date
  guides: number
}

/** Accounts, the newest first, whose name or address holds the words; `before` is the last row of the page before. */
export function listPeople(
  tx: Tx,
  options: { search: string; before?: { at: Date; id: string }; limit: number },
): SitePersonRow[] {
  const { search, before, limit } = options
  const pattern = `%${search.replace(/[\\%_]/g, (sign) => `\\${sign}`)}%`
  const matches = (column: typeof users.name | typeof users.email) =>
    sql`${column} like ${pattern} escape '\\'`
  return tx
    .select({
      id: users.id,
      name: users.name,
      email: users.email,
      role: users.role,
      emailVerified: users.emailVerified,
      createdAt: users.createdAt,
      guides: sql<number>`(select count(distinct ${guideMembers.guideId}) from ${guideMembers} where ${guideMembers.userId} = ${users.id})`,
    })
    .from(users)
    .where(
      and(
        search === '' ? undefined : or(matches(users.name), matches(users.email)),
        before === undefined
          ? undefined
          : or(lt(users.createdAt, before.at), and(eq(users.createdAt, before.at), lt(users.id, before.id))),
      ),
    )
    .orderBy(desc(users.createdAt), desc(users.id))
    .limit(limit)
    .all()
}

export function setSiteRole(tx: Tx, userId: string, role: SiteRole): void {
  tx.update(users).set({ role }).where(eq(users.id, userId)).run()
}

export function readSitePerson(tx: Tx, userId: string): SitePersonRow | undefined {
  const user = tx.select().from(users).where(eq(users.id, userId)).get()
  if (user === undefined) return undefined
  const held = tx
    .select({ n: sql<number>`count(distinct ${guideMembers.guideId})` })
    .from(guideMembers)
    .where(eq(guideMembers.userId, userId))
    .get()
  return { ...user, guides: held?.n ?? 0 }
}
