import path from 'node:path'
import { customAlphabet } from 'nanoid'
import { pino, type Logger } from 'pino'
import type { Config } from './config'
import { openDb, type Db } from './db/open'
import { FolderStorage } from './files/folderStorage'
import type { Storage } from './files/storage'
import { JobQueue } from './jobs/queue'
import { createWorkers, type Workers } from './workers/workers'

/** Everything with a life, built once from the configuration. A test builds its own and replaces what it needs. */
export interface Context {
  config: Config
  db: Db
  storage: Storage
  jobs: JobQueue
  workers: Workers
  log: Logger
  now: () => Date
  newId: () => string
  close: () => Promise<void>
}

const letters = 'abcdefghijklmnopqrstuvwxyz'
const firstLetter = customAlphabet(letters, 1)
const rest = customAlphabet(`${letters}0123456789`, 15)

/** A lasting id: a letter, then 15 letters or digits (78 bits by chance). */
export const newId = (): string => firstLetter() + rest()

export function createContext(config: Config, overrides: Partial<Context> = {}): Context {
  const opened = openDb(path.join(config.dataDir, 'quern.db'))
  const log = overrides.log ?? pino({ level: config.production ? 'info' : 'debug' })
  const now = overrides.now ?? (() => new Date())
  const jobs = new JobQueue(opened.db, log, now, newId)
  const workers = overrides.workers ?? createWorkers(log)
  return {
    config,
    db: opened.db,
    storage: new FolderStorage(path.join(config.dataDir, 'files')),
    jobs,
    workers,
    log,
    now,
    newId,
    close: async () => {
      await jobs.stop()
      await workers.close()
      opened.close()
    },
    ...overrides,
  }
}
