import { createHash, randomUUID } from 'node:crypto'
import { createReadStream, mkdirSync, rmSync } from 'node:fs'
import { access, mkdir, open, rename, rm } from 'node:fs/promises'
import path from 'node:path'
import { pipeline } from 'node:stream/promises'
import type { Readable } from 'node:stream'
import type { Storage } from './storage'

/** `files/ab/cd/<sha256>`; half-finished files stand in `files/tmp`, which is emptied at start. */
export class FolderStorage implements Storage {
  readonly temporaryDir: string

  constructor(private readonly root: string) {
    this.temporaryDir = path.join(root, 'tmp')
    rmSync(this.temporaryDir, { recursive: true, force: true })
    mkdirSync(this.temporaryDir, { recursive: true })
  }

  pathOf(sha256: string): string {
    if (!/^[0-9a-f]{64}$/.test(sha256)) throw new RangeError(`Not a SHA-256: ${sha256}`)
    return path.join(this.root, sha256.slice(0, 2), sha256.slice(2, 4), sha256)
  }

  async has(sha256: string): Promise<boolean> {
    try {
      await access(this.pathOf(sha256))
      return true
    } catch (error) {
      if ((error as NodeJS.ErrnoException).code === 'ENOENT') return false
      throw error
    }
  }

  async keepFile(temporary: string): Promise<string> {
    const hash = createHash('sha256')
    await pipeline(createReadStream(temporary), hash)
    const sha256 = hash.digest('hex')
    if (await this.has(sha256)) {
      await rm(temporary)
      return sha256
    }
    const target = this.pathOf(sha256)
    await mkdir(path.dirname(target), { recursive: true })
    await sync(temporary, 'r+')
    await rename(temporary, target)
    await sync(path.dirname(target), 'r')
    return sha256
  }

  async keepBytes(bytes: Uint8Array): Promise<string> {
    const temporary = path.join(this.temporaryDir, randomUUID())
    const file = await open(temporary, 'wx')
    try {
      await file.writeFile(bytes)
    } finally {
      await file.close()
    }
    return this.keepFile(temporary)
  }

  read(sha256: string): Readable {
    return createReadStream(this.pathOf(sha256))
  }
}

async function sync(target: string, flags: string): Promise<void> {
  const handle = await open(target, flags)
  try {
    await handle.sync()
  } finally {
    await handle.close()
  }
}
