import type { Logger } from 'pino'
import type { Db, Tx } from '../db/open'
import { dropDoneBefore, endJob, insertJob, nextDue, putOff, reviveJobs, takeJob, type JobRow } from './repo'

/** Does one job. Safe to run twice: a process may be killed between the work and the note that it is done. */
export type Handler = (payload: never) => Promise<void>

interface Kind {
  run: Handler
  /** After so many attempts the job is given up and stays as failed; Infinity for what must never be lost. */
  attempts: number
  /** Told once when the job is given up. */
  giveUp?: (payload: never, error: Error) => void
}

const FIRST_WAIT_MS = 1000
const LONGEST_WAIT_MS = 3600_000
const KEPT_MS = 7 * 24 * 3600_000

/**
 * The jobs table and its workers. A job is a row, written in the transaction that causes it, so that neither exists without the
 * other. `concurrency` jobs run at once; heavy work goes on to worker threads from there.
 */
export class JobQueue {
  private readonly kinds = new Map<string, Kind>()
  private readonly running = new Set<Promise<void>>()
  private timer: NodeJS.Timeout | undefined
  private stopped = true

  constructor(
    private readonly db: Db,
    private readonly log: Logger,
    private readonly now: () => Date,
    private readonly newId: () => string,
    private readonly concurrency = 2,
  ) {}

  handle<Payload>(
    kind: string,
    run: (payload: Payload) => Promise<void>,
    options: { attempts?: number; giveUp?: (payload: Payload, error: Error) => void } = {},
  ): void {
    this.kinds.set(kind, {
      run: run as Handler,
      attempts: options.attempts ?? 8,
      giveUp: options.giveUp as Kind['giveUp'],
    })
  }

  /**
   * Adds a job inside the caller's transaction. With a `key`, a job that waits under the same key is not doubled. `rank` 0 goes
   * first; what nobody waits for takes a higher one.
   */
  add(
    tx: Tx,
    kind: string,
    payload: unknown,
    options: { key?: string; delayMs?: number; rank?: number } = {},
  ): void {
    const now = this.now()
    insertJob(tx, {
      id: this.newId(),
      kind,
      payload: JSON.stringify(payload),
      key: options.key ?? null,
      state: 'waiting',
      rank: options.rank ?? 0,
      runAt: new Date(now.getTime() + (options.delayMs ?? 0)),
      createdAt: now,
    })
    if (!this.stopped) this.wake(0)
  }

  start(): void {
    this.stopped = false
    reviveJobs(this.db)
    dropDoneBefore(this.db, new Date(this.now().getTime() - KEPT_MS))
    this.wake(0)
  }

  /** Finishes the jobs in hand, takes no new ones. */
  async stop(): Promise<void> {
    this.stopped = true
    clearTimeout(this.timer)
    await Promise.allSettled(this.running)
  }

  /** Runs everything that is due until nothing is, for tests and for loading the demo. */
  async drain(): Promise<void> {
    for (let job = takeJob(this.db, this.now()); job !== undefined; job = takeJob(this.db, this.now())) {
      await this.run(job)
    }
  }

  private wake(delayMs: number): void {
    clearTimeout(this.timer)
    this.timer = setTimeout(() => this.fill(), delayMs)
    this.timer.unref()
  }

  private fill(): void {
    while (!this.stopped && this.running.size < this.concurrency) {
      const job = takeJob(this.db, this.now())
      if (job === undefined) break
      const work = this.run(job).finally(() => {
        this.running.delete(work)
        if (!this.stopped) this.wake(0)
      })
      this.running.add(work)
    }
    const due = nextDue(this.db)
    if (!this.stopped && due !== undefined && this.running.size < this.concurrency) {
      this.wake(Math.min(Math.max(due.getTime() - this.now().getTime(), 50), 60_000))
    }
  }

  private async run(job: JobRow): Promise<void> {
    const kind = this.kinds.get(job.kind)
    try {
      if (kind === undefined) throw new Error(`No handler for jobs of kind ${job.kind}`)
      await kind.run(JSON.parse(job.payload) as never)
      endJob(this.db, job.id, 'done', this.now(), null)
    } catch (caught) {
      const error = caught instanceof Error ? caught : new Error(String(caught))
      this.log.warn({ err: error, job: job.id, kind: job.kind, attempt: job.attempts }, 'job failed')
      if (kind === undefined || job.attempts >= kind.attempts) {
        endJob(this.db, job.id, 'failed', this.now(), error.message)
        kind?.giveUp?.(JSON.parse(job.payload) as never, error)
      } else {
        const wait = Math.min(FIRST_WAIT_MS * 2 ** (job.attempts - 1), LONGEST_WAIT_MS)
        putOff(this.db, job.id, new Date(this.now().getTime() + wait), error.message)
      }
    }
  }
}
