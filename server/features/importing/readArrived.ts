import { readFile, rm, stat } from 'node:fs/promises'
import path from 'node:path'
import type { BroughtFile } from '../../../shared/importing/broughtFile'
import type { Context } from '../../context'
import { bringFile } from '../../files/bringFile'
import { decodeText } from './decodeText'
import { readWorkbook } from './readWorkbook'
import { unpack, type Unpacked } from './unpack'

/** A file that arrived, in the storage's temporary folder. */
export interface Arrived {
  path: string
  file: string
  bytes: number
}

const TEXTS = /\.(md|markdown|mdown|mkd|txt|csv|tsv|tab)$|(^|\/)(licen[cs]e|copying)[^/]*$/i
const PICTURES = /\.(jpe?g|png|webp|heic|heif|avif|gif|bmp|tiff?|svg)$/i
const MODELS = /\.stl$/i
const MOST_TEXT = 5 * 1024 * 1024
const MOST_WORKBOOK = 20 * 1024 * 1024

/**
 * Reads what arrived: a ZIP is unpacked, texts and workbooks are read at once, pictures and models stored by content. Whatever cannot
 * be used is listed with its reason. The temporary files are gone afterwards.
 * @throws BadZip where the only thing that arrived is a ZIP that cannot be unpacked.
 */
export async function readArrived(
  ctx: Context,
  personId: string,
  arrived: readonly Arrived[],
  tell: (done: number, total: number, now: string) => void,
): Promise<BroughtFile[]> {
  const files: Unpacked[] = []
  try {
    for (const one of arrived) {
      if (!/\.zip$/i.test(one.path)) files.push(one)
      else files.push(...(await unpack(one.file, ctx.storage.temporaryDir)))
    }
    const brought: BroughtFile[] = []
    for (const [at, one] of files.entries()) {
      tell(at, files.length, one.path)
      brought.push(
        'why' in one ? { path: one.path, kind: 'unused', why: one.why } : await readOne(ctx, personId, one),
      )
    }
    return brought
  } finally {
    const left = [
      ...arrived.map(({ file }) => file),
      ...files.flatMap((one) => ('file' in one ? [one.file] : [])),
    ]
    await Promise.all(left.map((file) => rm(file, { force: true })))
  }
}

async function readOne(ctx: Context, personId: string, one: Arrived): Promise<BroughtFile> {
  const unused = (why: string): BroughtFile => ({ path: one.path, kind: 'unused', why })
  if (TEXTS.test(one.path)) {
    if (one.bytes > MOST_TEXT) return unused('This text is larger than 5 MB. Bring a part of it.')
    const text = decodeText(await readFile(one.file))
    if (text.includes('\0')) return unused('This is not text by its content.')
    return { path: one.path, kind: 'text', text }
  }
  if (/\.xlsx$/i.test(one.path)) {
    if (one.bytes > MOST_WORKBOOK)
      return unused('This workbook is larger than 20 MB. Bring the sheet that is needed as CSV.')
    try {
      return { path: one.path, kind: 'sheets', sheets: await readWorkbook(one.file) }
    } catch (error) {
      ctx.log.info({ err: error, path: one.path }, 'workbook not read')
      return unused(
        'This workbook is damaged or locked and cannot be read. Save it again, or bring it as CSV.',
      )
    }
  }
  if (PICTURES.test(one.path) || MODELS.test(one.path)) {
    const { size } = await stat(one.file)
    const brought = await bringFile(ctx, personId, {
      path: one.file,
      name: path.posix.basename(one.path),
      bytes: size,
    })
    if (!brought.ok) return unused(brought.sentence)
    return { path: one.path, kind: brought.file.kind, sha256: brought.file.sha256 }
  }
  if (/\.zip$/i.test(one.path)) return unused('A ZIP within a ZIP is not unpacked. Bring it by itself.')
  if (/\.(ods|xls)$/i.test(one.path))
    return unused('Workbooks of this kind are not read. Save it as XLSX or CSV.')
  return unused('Files of this kind are not used in a guide.')
}
