import { and, asc, eq, lt, lte } from 'drizzle-orm'
import type { Db, Tx } from '../db/open'
import { jobs } from '../db/schema'

export type JobRow = typeof jobs.$inferSelect

export function insertJob(tx: Tx, row: typeof jobs.$inferInsert): void {
  tx.insert(jobs).values(row).onConflictDoNothing({ target: jobs.key }).run()
}

/** Takes the job of the lowest rank that is due longest, marks it as running and gives its key up: what comes now is new work. */
export function takeJob(db: Db, now: Date): JobRow | undefined {
  return db.transaction(
    (tx) => {
      const due = tx
        .select()
        .from(jobs)
        .where(and(eq(jobs.state, 'waiting'), lte(jobs.runAt, now)))
        .orderBy(asc(jobs.rank), asc(jobs.runAt))
        .limit(1)
        .get()
      if (due === undefined) return undefined
      return tx
        .update(jobs)
        .set({ state: 'running', attempts: due.attempts + 1, key: null })
        .where(eq(jobs.id, due.id))
        .returning()
        .get()
    },
    { behavior: 'immediate' },
  )
}

export function endJob(db: Db, id: string, state: 'done' | 'failed', now: Date, error: string | null): void {
  db.update(jobs).set({ state, doneAt: now, error }).where(eq(jobs.id, id)).run()
}

export function putOff(db: Db, id: string, runAt: Date, error: string): void {
  db.update(jobs).set({ state: 'waiting', runAt, error }).where(eq(jobs.id, id)).run()
}

/** Jobs that a killed process left running are waiting again. */
export function reviveJobs(db: Db): void {
  db.update(jobs).set({ state: 'waiting' }).where(eq(jobs.state, 'running')).run()
}

export function dropDoneBefore(db: Db, before: Date): void {
  db.delete(jobs)
    .where(and(eq(jobs.state, 'done'), lt(jobs.doneAt, before)))
    .run()
}

export function nextDue(db: Db): Date | undefined {
  return db
    .select({ runAt: jobs.runAt })
    .from(jobs)
    .where(eq(jobs.state, 'waiting'))
    .orderBy(asc(jobs.runAt))
    .limit(1)
    .get()?.runAt
}
