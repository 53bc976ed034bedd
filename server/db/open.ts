import path from 'node:path'
import { fileURLToPath } from 'node:url'
import Database from 'better-sqlite3'
import { drizzle } from 'drizzle-orm/better-sqlite3'
import { migrate } from 'drizzle-orm/better-sqlite3/migrator'
import * as schema from './schema'

export type Db = ReturnType<typeof openDb>['db']
/** The database or a transaction on it: what a repo function accepts. */
export type Tx = Db | Parameters<Parameters<Db['transaction']>[0]>[0]

const MIGRATIONS = path.join(rootDir(), 'server/db/migrations')

/** The folder of package.json, from the source and from the built file alike. */
export function rootDir(): string {
  const here = path.dirname(fileURLToPath(import.meta.url))
  return here.includes(`${path.sep}dist${path.sep}`) || here.endsWith(`${path.sep}dist`)
    ? here.slice(0, here.lastIndexOf(`${path.sep}dist`))
    : path.resolve(here, '../..')
}

/** Opens the file (":memory:" for a test), sets the pragmas and brings the schema up to date. */
export function openDb(file: string) {
  const sqlite = new Database(file)
  sqlite.pragma('journal_mode = WAL')
  // FULL: a save that was answered survives a power cut, not only a killed process.
  sqlite.pragma('synchronous = FULL')
  sqlite.pragma('foreign_keys = ON')
  sqlite.pragma('busy_timeout = 5000')
  const db = drizzle(sqlite, { schema })
  migrate(db, { migrationsFolder: MIGRATIONS })
  return { db, sqlite, close: () => sqlite.close() }
}
