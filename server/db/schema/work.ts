import { index, integer, sqliteTable, text } from 'drizzle-orm/sqlite-core'

/** Work that outlives a request. Taken by the worker, retried with back-off, safe to run twice; done rows are kept for a week. */
export const jobs = sqliteTable(
  'job',
  {
    id: text('id').primaryKey(),
    kind: text('kind').notNull(),
    payload: text('payload').notNull(),
    /** Two jobs with one key are one job while the first is waiting. */
    key: text('key').unique(),
    state: text('state', { enum: ['waiting', 'running', 'done', 'failed'] }).notNull(),
    attempts: integer('attempts').notNull().default(0),
    /** Of the jobs that are due the lowest rank goes first: 0 for what somebody waits for, more for what can wait. */
    rank: integer('rank').notNull().default(0),
    runAt: integer('run_at', { mode: 'timestamp_ms' }).notNull(),
    error: text('error'),
    createdAt: integer('created_at', { mode: 'timestamp_ms' }).notNull(),
    doneAt: integer('done_at', { mode: 'timestamp_ms' }),
  },
  (table) => [index('job_due').on(table.state, table.rank, table.runAt)],
)

/** Mail to send and mail sent. Written in the transaction that causes it; a failed send is tried again, never dropped. */
export const mails = sqliteTable(
  'mail',
  {
    id: text('id').primaryKey(),
    recipient: text('recipient').notNull(),
    subject: text('subject').notNull(),
    text: text('text').notNull(),
    html: text('html').notNull(),
    language: text('language').notNull(),
    state: text('state', { enum: ['waiting', 'sent', 'refused'] }).notNull(),
    attempts: integer('attempts').notNull().default(0),
    error: text('error'),
    createdAt: integer('created_at', { mode: 'timestamp_ms' }).notNull(),
    sentAt: integer('sent_at', { mode: 'timestamp_ms' }),
  },
  (table) => [index('mail_created').on(table.createdAt)],
)
