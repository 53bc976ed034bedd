import type { Readable } from 'node:stream'

/** Files by the hash of their bytes. A file is there whole or not at all. */
export interface Storage {
  /** Takes over a finished file: synced, then renamed to its place. Storing the same bytes twice keeps one. @returns its hash. */
  keepFile(temporary: string): Promise<string>
  keepBytes(bytes: Uint8Array): Promise<string>
  has(sha256: string): Promise<boolean>
  /** A path that workers can read. @throws if there is no such file. */
  pathOf(sha256: string): string
  read(sha256: string): Readable
  /** A folder for half-finished files, on the same disk; emptied at start. */
  temporaryDir: string
}
