import { spawn, type ChildProcess } from 'node:child_process'
import { once } from 'node:events'
import { mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs'
import { createServer, type AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { setTimeout as wait } from 'node:timers/promises'
import Database from 'better-sqlite3'
import { Client } from '../api/client'
import { createTestSite, type TestPerson } from '../api/testSite'

const root = path.resolve(import.meta.dirname, '../..')
/** The harness signs cookies with it; the process gets the same. */
const SECRET = 'a secret for tests that is long enough'

const FROM_SOURCE = ['--import', 'tsx', 'tests/faults/serve.ts']
/** With its pages, as `vite build --app` leaves it. */
const BUILT = ['dist/server/main.js']

/** The server as a process of its own, which can be killed as a power cut would. */
export class ServerProcess {
  private child: ChildProcess | undefined
  output = ''

  private constructor(
    readonly dataDir: string,
    readonly port: number,
    readonly person: TestPerson,
    private readonly entry: readonly string[],
  ) {}

  /** Makes a data folder with one person who is signed in, and starts the server on it. */
  static async start(options: { built?: boolean } = {}): Promise<ServerProcess> {
    const dataDir = mkdtempSync(path.join(tmpdir(), 'quern-fault-'))
    const site = await createTestSite({ dataDir })
    const person = site.person()
    await site.close()
    const server = new ServerProcess(
      dataDir,
      await freePort(),
      person,
      options.built === true ? BUILT : FROM_SOURCE,
    )
    await server.boot()
    return server
  }

  async boot(): Promise<void> {
    const child = spawn(process.execPath, [...this.entry], {
      cwd: root,
      env: {
        ...process.env,
        NODE_ENV: 'production',
        PORT: String(this.port),
        APP_URL: `http://localhost:${this.port}`,
        DATA_DIR: this.dataDir,
        SECRET,
        DEMO: 'off',
        SMTP_URL: '',
      },
      stdio: ['ignore', 'pipe', 'pipe'],
    })
    this.child = child
    child.stdout.on('data', (chunk: Buffer) => (this.output += chunk.toString()))
    child.stderr.on('data', (chunk: Buffer) => (this.output += chunk.toString()))
    for (let tries = 0; tries < 300; tries += 1) {
      if (child.exitCode !== null) throw new Error(`The server ended:\n${this.output}`)
      if (/ready\n|Quern is at/.test(this.output)) return
      await wait(50)
    }
    throw new Error(`The server did not start:\n${this.output}`)
  }

  get client(): Client {
    return new Client(`http://127.0.0.1:${this.port}`, this.person.cookie)
  }

  /** Resident memory of the process in KiB: now, and the most it ever was. */
  memory(): { now: number; most: number } {
    const status = readFileSync(`/proc/${this.child!.pid}/status`, 'utf8')
    const read = (field: string): number => Number(new RegExp(`${field}:\\s+(\\d+) kB`).exec(status)?.[1])
    return { now: read('VmRSS'), most: read('VmHWM') }
  }

  async kill(): Promise<void> {
    await this.end('SIGKILL')
    this.output = ''
  }

  async stop(): Promise<void> {
    await this.end('SIGTERM')
    rmSync(this.dataDir, { recursive: true, force: true })
  }

  async end(signal: NodeJS.Signals): Promise<number | null> {
    const child = this.child
    if (child === undefined || child.exitCode !== null || child.signalCode !== null)
      return child?.exitCode ?? null
    const ended = once(child, 'exit') as Promise<[number | null]>
    child.kill(signal)
    return (await ended)[0]
  }

  /** Rows of the database, read while no server or any runs. */
  rows<Row>(query: string): Row[] {
    const db = new Database(path.join(this.dataDir, 'quern.db'))
    try {
      return db.prepare<[], Row>(query).all()
    } finally {
      db.close()
    }
  }

  temporary(): string[] {
    return readdirSync(path.join(this.dataDir, 'files/tmp'))
  }

  /** Every stored file: its name, which must be its hash. */
  stored(): string[] {
    return readdirSync(path.join(this.dataDir, 'files'), { recursive: true, withFileTypes: true })
      .filter((entry) => entry.isFile() && !entry.parentPath.startsWith(path.join(this.dataDir, 'files/tmp')))
      .map((entry) => path.join(entry.parentPath, entry.name))
  }
}

async function freePort(): Promise<number> {
  const server = createServer()
  server.listen(0)
  await once(server, 'listening')
  const { port } = server.address() as AddressInfo
  server.close()
  await once(server, 'close')
  return port
}
