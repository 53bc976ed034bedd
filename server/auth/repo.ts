import { and, eq, not, like } from 'drizzle-orm'
import type { Person } from '../../shared/access/ability'
import { DEMO_DOMAIN } from '../../shared/access/demoAddress'
import type { Tx } from '../db/open'
import { accounts, guideMembers, users } from '../db/schema'

export type UserRow = typeof users.$inferSelect

export interface SignedIn extends Person {
  name: string
  email: string
  language: string
}

/** A person with the roles held on guides, read anew for every request so that a role taken away is gone at once. */
export function readPerson(tx: Tx, userId: string): SignedIn | undefined {
  const user = readUser(tx, userId)
  if (user === undefined) return undefined
  const held = tx.select().from(guideMembers).where(eq(guideMembers.userId, userId)).all()
  return {
    id: user.id,
    role: user.role,
    name: user.name,
    email: user.email,
    language: user.language,
    guides: held.map(({ guideId, role, language }) => ({ guideId, role, language })),
  }
}

export function readUser(tx: Tx, userId: string): UserRow | undefined {
  return tx.select().from(users).where(eq(users.id, userId)).get()
}

/** Addresses are kept in lower case. */
export function readUserByEmail(tx: Tx, email: string): UserRow | undefined {
  return tx.select().from(users).where(eq(users.email, email.toLowerCase())).get()
}

export function markConfirmed(tx: Tx, userId: string): void {
  tx.update(users).set({ emailVerified: true }).where(eq(users.id, userId)).run()
}

/**
 * The first person to confirm an address on a fresh site is its curator: whoever set the site up is there first. Never in demo mode,
 * where the demo's own curator is and where strangers look around; the demo's accounts do not count.
 */
export function nameFirstCurator(tx: Tx, userId: string, demo: boolean): void {
  if (demo) return
  const confirmed = tx
    .select({ id: users.id })
    .from(users)
    .where(and(eq(users.emailVerified, true), not(like(users.email, `%@${DEMO_DOMAIN}`))))
    .limit(2)
    .all()
  if (confirmed.length === 1 && confirmed[0]!.id === userId) {
    tx.update(users).set({ role: 'curator' }).where(eq(users.id, userId)).run()
  }
}

/**
 * Drops a sign-up that was never confirmed, so that a later one with the same address stands alone: its mail confirms its own
 * password, and the earlier mail confirms nothing.
 */
export function dropUnconfirmed(tx: Tx, email: string): void {
  tx.delete(users)
    .where(and(eq(users.email, email.toLowerCase()), eq(users.emailVerified, false)))
    .run()
}

export function hasPassword(tx: Tx, userId: string): boolean {
  const account = tx
    .select({ password: accounts.password })
    .from(accounts)
    .where(and(eq(accounts.userId, userId), eq(accounts.providerId, 'credential')))
    .get()
  return typeof account?.password === 'string'
}

export function insertUser(
  tx: Tx,
  user: typeof users.$inferInsert,
  passwordHash: string,
  accountId: string,
): void {
  tx.insert(users).values(user).run()
  tx.insert(accounts)
    .values({
      id: accountId,
      accountId: user.id,
      providerId: 'credential',
      userId: user.id,
      password: passwordHash,
      createdAt: user.createdAt,
      updatedAt: user.createdAt,
    })
    .run()
}

/** Whether anybody has an account yet, confirmed or not. */
export function hasPeople(tx: Tx): boolean {
  return tx.select({ id: users.id }).from(users).limit(1).get() !== undefined
}
