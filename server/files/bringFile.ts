import { rm } from 'node:fs/promises'
import type { FileEntry } from '../../shared/api/files'
import type { Context } from '../context'
import type { Tx } from '../db/open'
import { presentFile } from './presentFile'
import { insertFile, readFile, readFiles, setFileState } from './repo'
import { sniff } from './sniff'

const MB = 1024 * 1024
export const LARGEST = { picture: 40 * MB, model: 120 * MB } as const

/** A file that has arrived whole, in a temporary place. */
export interface ArrivedFile {
  path: string
  /** As the person named it. */
  name: string
  bytes: number
}

export type Brought = { ok: true; file: FileEntry } | { ok: false; sentence: string }

/**
 * Judges a file by its content, stores it, and only then makes its row and the job that works on it. The same bytes a second time are
 * the same file; one that could not be worked on is tried anew. The temporary file is gone afterwards, whatever comes of it.
 */
export async function bringFile(
  ctx: Context,
  personId: string | null,
  arrived: ArrivedFile,
): Promise<Brought> {
  try {
    const judged = await judge(ctx, arrived)
    if (!judged.ok) return judged
    const { kind, mediaType } = judged
    const sha256 = await ctx.storage.keepFile(arrived.path)
    return ctx.db.transaction(
      (tx) => {
        const isNew = insertFile(tx, {
          sha256,
          kind,
          mediaType,
          bytes: arrived.bytes,
          name: plainName(arrived.name),
          state: 'working',
          uploadedBy: personId,
          createdAt: ctx.now(),
        })
        if (isNew || startAnew(tx, sha256))
          ctx.jobs.add(tx, kind, { sha256 }, { key: `${kind} ${sha256}`, rank: 1 })
        return { ok: true, file: presentFile(readFiles(tx, [sha256])[0]!) }
      },
      { behavior: 'immediate' },
    )
  } finally {
    await rm(arrived.path, { force: true })
  }
}

/** @returns whether there is work to do again. */
function startAnew(tx: Tx, sha256: string): boolean {
  if (readFile(tx, sha256)?.state !== 'failed') return false
  setFileState(tx, sha256, { state: 'working', trouble: null })
  return true
}

async function judge(ctx: Context, { path, name, bytes }: ArrivedFile): ReturnType<typeof sniff> {
  const sniffed = await sniff(path, name, bytes)
  if (!sniffed.ok) return sniffed
  const limit = LARGEST[sniffed.kind]
  if (bytes > limit) return { ok: false, sentence: tooLarge(limit) }
  if (sniffed.kind === 'model') return sniffed
  const inspected = await ctx.workers.run('inspectPicture', { file: path })
  if (inspected.ok) return sniffed
  if (inspected.why === 'too-many-pixels') {
    const sentence = `This picture has ${inspected.megapixels.toLocaleString('en-GB')} megapixels; at most 100 can be taken. Make it smaller.`
    return { ok: false, sentence }
  }
  const heif = /hei[cf]|avif/.test(sniffed.mediaType)
  const sentence = heif
    ? 'This site cannot read pictures of this kind (HEIF). Save it as JPEG and bring that.'
    : 'This picture is damaged and cannot be read. Save it again and bring that.'
  return { ok: false, sentence }
}

export const tooLarge = (limit: number): string =>
  `This file is larger than ${limit / MB} MB. Make it smaller, or split it.`

/** A name without folders and control characters, in one Unicode form, so that it can stand in a download. */
function plainName(name: string): string {
  const last = name.normalize('NFC').split(/[/\\]/).at(-1) ?? ''
  const plain = last.replace(/[\p{Cc}\p{Cf}\p{Cs}]/gu, '').trim()
  return [...plain].slice(0, 200).join('') || 'file'
}
