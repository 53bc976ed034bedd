import { createRequire } from 'node:module'
import path from 'node:path'
import { pathToFileURL } from 'node:url'
import type { Logger } from 'pino'
import { Tinypool } from 'tinypool'
import { rootDir } from '../db/open'

type Work = typeof import('./worker')

/** Heavy work in processes beside the server's: its memory is theirs, and what makes one of them fall over leaves the site up. */
export interface Workers {
  run<Name extends keyof Work>(name: Name, ask: Parameters<Work[Name]>[0]): ReturnType<Work[Name]>
  close(): Promise<void>
}

/** One more than jobs run at once, so that an upload is looked at while two long jobs are under way. */
const MOST = 3
/** An idle site has no worker: the next one starts in a fraction of a second. */
const IDLE_MS = 10_000

/** The pool starts with the first task. */
export function createWorkers(log: Logger): Workers {
  let pool: Tinypool | undefined
  return {
    run(name, ask) {
      pool ??= startPool(log)
      return pool.run(ask, { name }) as ReturnType<Work[typeof name]>
    },
    close: async () => pool?.destroy(),
  }
}

function startPool(log: Logger): Tinypool {
  const { file, execArgv } = workerFile()
  const pool = new Tinypool({
    filename: file,
    runtime: 'child_process',
    minThreads: 0,
    maxThreads: MOST,
    idleTimeout: IDLE_MS,
    execArgv,
    env: inherited(),
  })
  // A worker that ends while nobody waits for it. Where somebody does, the task itself is refused and its job tried again.
  pool.on('error', (error: unknown) => log.warn({ err: error }, 'a worker ended'))
  return pool
}

/** The built worker; from the source (in development and in tests) it is TypeScript, which tsx loads. */
function workerFile(): { file: string; execArgv: string[] } {
  const fromSource = import.meta.url.endsWith('.ts')
  if (!fromSource) return { file: path.join(rootDir(), 'dist/server/worker.js'), execArgv: [] }
  const tsx = createRequire(import.meta.url).resolve('tsx')
  return {
    file: path.join(rootDir(), 'server/workers/worker.ts'),
    execArgv: ['--import', pathToFileURL(tsx).href],
  }
}

const inherited = (): Record<string, string> =>
  Object.fromEntries(
    Object.entries(process.env).filter((pair): pair is [string, string] => pair[1] !== undefined),
  )
