import { randomUUID } from 'node:crypto'
import { createReadStream } from 'node:fs'
import { open, rm, type FileHandle } from 'node:fs/promises'
import path from 'node:path'
import { Unzip, UnzipInflate, type UnzipFile } from 'fflate'

/** A file on the disk with its path in the design. `why` is set for one that was not unpacked. */
export type Unpacked = { path: string; file: string; bytes: number } | { path: string; why: string }

export const UNPACK_LIMITS = { entries: 2000, bytes: 1024 ** 3 } as const

/** A ZIP that is refused as a whole; the message is a sentence for the person. */
export class BadZip extends Error {}

/**
 * Unpacks a ZIP into a folder under names of our own, as a stream: bytes are counted while they are inflated, so that a small file that
 * unfolds without end stops at the limit. Paths that leave the folder are refused, folders and hidden files passed over.
 * @throws BadZip for what is no ZIP, breaks off, or holds more than the limits.
 */
export async function unpack(
  zip: string,
  folder: string,
  limits: { entries: number; bytes: number } = UNPACK_LIMITS,
): Promise<Unpacked[]> {
  const found: Unpacked[] = []
  const written: string[] = []
  const work: { handle: Promise<FileHandle>; chunks: Uint8Array[] }[] = []
  let failure: Error | null = null
  let total = 0
  let entries = 0
  let open_ = 0

  const onFile = (entry: UnzipFile): void => {
    entries += 1
    if (entries > limits.entries) {
      failure ??= new BadZip(`This ZIP holds more than ${limits.entries} files. Bring a part of them.`)
      return
    }
    const name = entry.name.replace(/\\/g, '/')
    if (
      name.endsWith('/') ||
      /(^|\/)(\.[^/]+|__MACOSX|Thumbs\.db)(\/|$)/.test(name.replace(/(^|\/)\.\.?(?=\/)/g, '$1'))
    )
      return
    if (isUnsafe(name)) {
      found.push({ path: name.slice(0, 2000), why: 'Its path leads out of the ZIP, so it was not unpacked.' })
      return
    }
    const file = path.join(folder, randomUUID())
    written.push(file)
    const target = { handle: open(file, 'wx'), chunks: [] as Uint8Array[] }
    work.push(target)
    let bytes = 0
    open_ += 1
    entry.ondata = (error, chunk, final) => {
      if (error !== null) {
        failure ??= new BadZip(
          `“${name.slice(0, 200)}” in this ZIP is damaged. Pack the files anew and bring that.`,
          { cause: error },
        )
        return
      }
      bytes += chunk.length
      total += chunk.length
      if (total > limits.bytes)
        failure ??= new BadZip(
          `This ZIP unpacks to more than ${Math.round(limits.bytes / 1024 ** 2)} MB. Bring a part of it.`,
        )
      else target.chunks.push(chunk)
      if (final) {
        open_ -= 1
        found.push({ path: name, file, bytes })
      }
    }
    entry.start()
  }

  const reader = new Unzip(onFile)
  reader.register(UnzipInflate)
  const flush = async (): Promise<void> => {
    for (const { handle, chunks } of work) {
      const opened = await handle
      for (const chunk of chunks.splice(0)) await opened.write(chunk)
    }
  }
  try {
    let first = true
    for await (const chunk of createReadStream(zip, { highWaterMark: 64 * 1024 }) as AsyncIterable<Buffer>) {
      if (first && !(chunk[0] === 0x50 && chunk[1] === 0x4b))
        throw new BadZip('This is not a ZIP. Pack the files anew and bring that.')
      first = false
      push(reader, chunk, false)
      if (failure !== null) throw failure as Error
      await flush()
    }
    push(reader, new Uint8Array(0), true)
    await flush()
    if (failure !== null) throw failure as Error
    if (open_ > 0 || entries === 0)
      throw new BadZip('This ZIP breaks off or is empty. Pack the files anew and bring that.')
    return found
  } catch (error) {
    await Promise.all(written.map((file) => rm(file, { force: true })))
    throw error
  } finally {
    for (const { handle } of work) await (await handle).close()
  }
}

function push(reader: Unzip, chunk: Uint8Array, final: boolean): void {
  try {
    reader.push(chunk, final)
  } catch (error) {
    throw new BadZip(
      'This ZIP is damaged or packed in a way that cannot be read. Pack the files anew and bring that.',
      { cause: error },
    )
  }
}

/** A path that is absolute or goes up. */
export const isUnsafe = (name: string): boolean =>
  name === '' ||
  name.startsWith('/') ||
  /^[a-z]:/i.test(name) ||
  name.split('/').includes('..') ||
  name.includes('\0')
