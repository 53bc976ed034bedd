import path from 'node:path'
import Database from 'better-sqlite3'

/**
 * Holds the data folder for this process. A second server on it would empty the first one's temporary files and take up its jobs.
 * The lock is the operating system's, by way of SQLite: it ends with the process, however that ends.
 * @returns false where another process holds it; else the function that lets go.
 */
export function lockDataDir(dataDir: string): false | (() => void) {
  const lock = new Database(path.join(dataDir, 'lock.db'), { timeout: 0 })
  try {
    lock.exec('begin exclusive')
    return () => lock.close()
  } catch (error) {
    lock.close()
    if (error instanceof Database.SqliteError && error.code === 'SQLITE_BUSY') return false
    throw error
  }
}
