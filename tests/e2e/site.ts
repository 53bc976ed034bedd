import { spawn, type ChildProcess } from 'node:child_process'
import { once } from 'node:events'
import { mkdtempSync, readdirSync, readFileSync, rmSync } from 'node:fs'
import { createServer, type AddressInfo } from 'node:net'
import { tmpdir } from 'node:os'
import path from 'node:path'
import { setTimeout as wait } from 'node:timers/promises'
import { chromium, type Browser } from 'playwright-core'

const root = path.resolve(import.meta.dirname, '../..')

/** Chromium as Debian has it: no network of its own, WebGL in software. */
const CHROMIUM_ARGUMENTS = [
  '--no-sandbox',
  '--disable-quic',
  '--no-first-run',
  '--disable-background-networking',
  '--disable-component-update',
  '--disable-sync',
  '--use-angle=swiftshader',
  '--enable-unsafe-swiftshader',
]

export const openBrowser = (): Promise<Browser> =>
  chromium.launch({ executablePath: '/usr/bin/chromium', args: CHROMIUM_ARGUMENTS })

/** The built server as a process of its own, on a data folder of its own. */
export class RunningSite {
  private process: ChildProcess | undefined
  output = ''

  private constructor(
    readonly dataDir: string,
    readonly port: number,
    private readonly demo: boolean,
  ) {}

  get address(): string {
    return `http://localhost:${this.port}`
  }

  static async start(options: { demo?: boolean } = {}): Promise<RunningSite> {
    const dataDir = mkdtempSync(path.join(tmpdir(), 'quern-e2e-'))
    const site = new RunningSite(dataDir, await freePort(), options.demo ?? false)
    await site.boot()
    return site
  }

  async boot(): Promise<void> {
    const child = spawn(process.execPath, [path.join(root, 'dist/server/main.js')], {
      cwd: root,
      env: {
        ...process.env,
        NODE_ENV: 'production',
        PORT: String(this.port),
        APP_URL: this.address,
        DATA_DIR: this.dataDir,
        DEMO: this.demo ? 'on' : 'off',
        SMTP_URL: '',
      },
      stdio: ['ignore', 'pipe', 'pipe'],
    })
    this.process = child
    child.stdout.on('data', (chunk: Buffer) => (this.output += chunk.toString()))
    child.stderr.on('data', (chunk: Buffer) => (this.output += chunk.toString()))
    for (let tries = 0; tries < 600; tries += 1) {
      if (child.exitCode !== null) throw new Error(`The server ended:\n${this.output}`)
      if (await answers(`${this.address}/guides`)) return
      await wait(100)
    }
    throw new Error(`The server does not answer:\n${this.output}`)
  }

  /** Ends the process as a power cut would. */
  async kill(): Promise<void> {
    await this.end('SIGKILL')
  }

  async stop(): Promise<void> {
    await this.end('SIGTERM')
    rmSync(this.dataDir, { recursive: true, force: true })
  }

  private async end(signal: NodeJS.Signals): Promise<void> {
    const child = this.process
    if (child === undefined || child.exitCode !== null || child.signalCode !== null) return
    const ended = once(child, 'exit')
    child.kill(signal)
    await ended
  }

  /** The text of the newest mail to this address, waiting for it; decoded from quoted-printable. */
  async mailTo(address: string): Promise<string> {
    const folder = path.join(this.dataDir, 'mail')
    for (let tries = 0; tries < 100; tries += 1) {
      const found = listFolder(folder)
        .map((name) => readFileSync(path.join(folder, name), 'utf8'))
        .filter((text) => text.toLowerCase().includes(`to: ${address.toLowerCase()}`))
      const newest = found.at(-1)
      if (newest !== undefined) return newest.replace(/=\r?\n/g, '').replace(/=3D/g, '=')
      await wait(100)
    }
    throw new Error(`No mail to ${address}`)
  }
}

function listFolder(folder: string): string[] {
  try {
    return readdirSync(folder).sort()
  } catch (error) {
    if ((error as NodeJS.ErrnoException).code === 'ENOENT') return []
    throw error
  }
}

async function answers(address: string): Promise<boolean> {
  try {
    return (await fetch(address)).ok
  } catch (error) {
    if (error instanceof TypeError) return false
    throw error
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
