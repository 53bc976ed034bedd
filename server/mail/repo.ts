import { and, eq, lt, or, desc, sql } from 'drizzle-orm'
import type { Db, Tx } from '../db/open'
import { mails } from '../db/schema'

export type MailRow = typeof mails.$inferSelect
export type MailState = MailRow['state']

export function insertMail(tx: Tx, row: typeof mails.$inferInsert): void {
  tx.insert(mails).values(row).run()
}

export function readMail(tx: Tx, id: string): MailRow | undefined {
  return tx.select().from(mails).where(eq(mails.id, id)).get()
}

export function noteAttempt(db: Db, id: string): void {
  db.update(mails)
    .set({ attempts: sql`${mails.attempts} + 1` })
    .where(eq(mails.id, id))
    .run()
}

export function noteSent(db: Db, id: string, sentAt: Date): void {
  db.update(mails).set({ state: 'sent', sentAt, error: null }).where(eq(mails.id, id)).run()
}

/** Why it did not go: `waiting` is tried again by its job, `refused` when a curator says so. */
export function noteTrouble(db: Db, id: string, state: 'waiting' | 'refused', error: string): void {
  db.update(mails).set({ state, error }).where(eq(mails.id, id)).run()
}

/** A refused mail waits again. @returns whether it was refused until now. */
export function waitAgain(tx: Tx, id: string): boolean {
  const { changes } = tx
    .update(mails)
    .set({ state: 'waiting', error: null })
    .where(and(eq(mails.id, id), eq(mails.state, 'refused')))
    .run()
  return changes > 0
}

/** Newest first; `before` is the last row of the page before. */
export function listMails(
  tx: Tx,
  options: { state?: MailState; before?: { at: Date; id: string }; limit: number },
): MailRow[] {
  const { state, before, limit } = options
  return tx
    .select()
    .from(mails)
    .where(
      and(
        state === undefined ? undefined : eq(mails.state, state),
        before === undefined
          ? undefined
          : or(lt(mails.createdAt, before.at), and(eq(mails.createdAt, before.at), lt(mails.id, before.id))),
      ),
    )
    .orderBy(desc(mails.createdAt), desc(mails.id))
    .limit(limit)
    .all()
}

export function listMailsTo(tx: Tx, recipient: string): MailRow[] {
  return tx.select().from(mails).where(eq(mails.recipient, recipient)).orderBy(mails.createdAt).all()
}

export function deleteMailsTo(tx: Tx, recipient: string): void {
  tx.delete(mails).where(eq(mails.recipient, recipient)).run()
}
