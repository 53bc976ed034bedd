import { createHmac, randomBytes } from 'node:crypto'
import { once } from 'node:events'
import { copyFileSync, mkdtempSync, rmSync } from 'node:fs'
import { createServer } from 'node:http'
import type { AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { Router } from 'express'
import { pino } from 'pino'
import type { GuideRole, SiteRole } from '../../shared/access/ability'
import { createApp } from '../../server/app'
import type { Config } from '../../server/config'
import { createContext, newId, type Context } from '../../server/context'
import { openDb } from '../../server/db/open'
import { guideMembers, sessions, users } from '../../server/db/schema'
import { featureJobs } from '../../server/features'
import type { Pages } from '../../server/pages/pages'
import { Client } from './client'

export { Client, type Answer, type FileToSend } from './client'

/** For the site's own cookie, which better-auth signs so: token, point, HMAC-SHA256 in base64. */
const SECRET = 'a secret for tests that is long enough'
const DAY_MS = 24 * 3600_000

/** Somebody with an account that is confirmed, and a session. */
export interface TestPerson {
  id: string
  name: string
  email: string
  cookie: string
}

export interface TestSiteOptions {
  config?: Partial<Config>
  /** Replaces what the context holds: a clock, a storage that fails. A function gets the data folder. */
  context?: Partial<Context> | ((dataDir: string) => Partial<Context>)
  /** Jobs run by themselves; otherwise `drain` runs what is due. */
  jobs?: 'running' | 'by hand'
  /** A folder of an earlier site, to start it anew; it is kept on `close`. */
  dataDir?: string
  pages?: (ctx: Context) => Pages
}

/** The real app with a database, a folder and a port of its own. */
export class TestSite {
  private constructor(
    readonly ctx: Context,
    readonly address: string,
    readonly dataDir: string,
    private readonly end: () => Promise<void>,
  ) {}

  static async start(options: TestSiteOptions = {}): Promise<TestSite> {
    const dataDir = options.dataDir ?? freshDataDir()
    const server = createServer()
    // The test shares the thread: while it computes, a connection must not be taken for an idle one.
    server.keepAliveTimeout = 120_000
    server.listen(0, '127.0.0.1')
    await once(server, 'listening')
    const { port } = server.address() as AddressInfo
    const address = `http://localhost:${port}`
    const ctx = createContext(
      {
        port,
        dataDir,
        appUrl: address,
        smtpUrl: undefined,
        secret: SECRET,
        demo: false,
        production: true,
        ...options.config,
      },
      {
        log: pino({ level: process.env['TEST_LOG'] ?? 'silent' }),
        ...(typeof options.context === 'function' ? options.context(dataDir) : options.context),
      },
    )
    const pages = options.pages?.(ctx) ?? noPages()
    const app = createApp(ctx, pages)
    featureJobs(ctx)
    if (options.jobs === 'running') ctx.jobs.start()
    server.on('request', (req, res) => {
      if (!pages.serveKept(req, res)) app(req, res)
    })
    return new TestSite(ctx, address, dataDir, async () => {
      server.closeAllConnections()
      server.close()
      await pages.close()
      await ctx.close()
      if (options.dataDir === undefined) rmSync(dataDir, { recursive: true, force: true })
    })
  }

  /** A new person who is signed in. */
  person(role: SiteRole = 'member', details: { name?: string; email?: string } = {}): TestPerson {
    const { db } = this.ctx
    const id = newId()
    const name = details.name ?? `Ada ${id.slice(0, 4)}`
    const email = details.email ?? `${id}@example.org`
    const now = this.ctx.now()
    db.insert(users)
      .values({ id, name, email, emailVerified: true, role, createdAt: now, updatedAt: now })
      .run()
    const token = randomBytes(24).toString('hex')
    db.insert(sessions)
      .values({
        id: newId(),
        token,
        userId: id,
        // better-auth reads the clock of the machine, whatever clock the test has.
        expiresAt: new Date(Date.now() + 30 * DAY_MS),
        createdAt: now,
        updatedAt: now,
      })
      .run()
    return { id, name, email, cookie: sessionCookie(token) }
  }

  /** Speaks as this person; null is a reader without an account. */
  as(person: TestPerson | null): Client {
    return new Client(this.address, person?.cookie ?? null)
  }

  /** Gives a person a role on a guide, without an invitation. */
  give(person: TestPerson, guideId: string, role: GuideRole, language = ''): void {
    this.ctx.db
      .insert(guideMembers)
      .values({ guideId, userId: person.id, role, language, createdAt: this.ctx.now() })
      .run()
  }

  /** Runs all jobs that are due. */
  drain(): Promise<void> {
    return this.ctx.jobs.drain()
  }

  close(): Promise<void> {
    return this.end()
  }
}

export const createTestSite = (options: TestSiteOptions = {}): Promise<TestSite> => TestSite.start(options)

const sessionCookie = (token: string): string =>
  `quern.session_token=${encodeURIComponent(`${token}.${createHmac('sha256', SECRET).update(token).digest('base64')}`)}`

/** Pages that answer nothing, for tests of the interface alone. */
const noPages = (): Pages => ({ router: Router(), serveKept: () => false, close: () => Promise.resolve() })

let migrated: string | undefined

/** Migrations run once for each file of tests; every site gets a copy of the empty database. */
function freshDataDir(): string {
  if (migrated === undefined) {
    const folder = mkdtempSync(path.join(tmpdir(), 'quern-migrated-'))
    migrated = path.join(folder, 'quern.db')
    openDb(migrated).close()
    process.once('exit', () => rmSync(folder, { recursive: true, force: true }))
  }
  const dataDir = mkdtempSync(path.join(tmpdir(), 'quern-test-'))
  copyFileSync(migrated, path.join(dataDir, 'quern.db'))
  return dataDir
}
