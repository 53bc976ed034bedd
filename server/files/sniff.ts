import { open } from 'node:fs/promises'
import { fileTypeFromFile } from 'file-type'
import { STL_FACET_BYTES, STL_HEADER_BYTES } from '../../shared/lib/geometry/stl'
import { sayRefusal } from '../meshes/sayRefusal'

/** What a file is by its content; its name is only asked where the content leaves it open. */
export type Sniffed =
  { ok: true; kind: 'picture' | 'model'; mediaType: string } | { ok: false; sentence: string }

const PICTURES = new Set([
  'image/jpeg',
  'image/png',
  'image/apng',
  'image/webp',
  'image/heic',
  'image/heif',
  'image/avif',
])
const WANTED = 'Bring a picture as JPEG, PNG, WebP or HEIC, or a model as STL.'
/** No STL that can be taken promises more; a file of anything else named .stl mostly does. */
const PLAUSIBLE_FACETS = 20_000_000
const HEAD_BYTES = 4096

export async function sniff(file: string, name: string, bytes: number): Promise<Sniffed> {
  if (bytes === 0) return refuse('This file is empty. Bring it in again.')
  const head = await headOf(file)
  if (isSvg(head)) {
    return refuse('SVG is not taken, since it can carry scripts. Bring PNG, JPEG or WebP.')
  }
  const namedStl = /\.stl$/i.test(name)
  if (isTextStl(head) || isExactStl(head, bytes)) return { ok: true, kind: 'model', mediaType: 'model/stl' }
  const type = await fileTypeFromFile(file)
  if (type === undefined)
    return namedStl ? binaryStl(head, bytes) : refuse(`This kind of file cannot be used here. ${WANTED}`)
  if (PICTURES.has(type.mime)) {
    return { ok: true, kind: 'picture', mediaType: type.mime === 'image/apng' ? 'image/png' : type.mime }
  }
  if (type.mime === 'application/zip') {
    return refuse('A ZIP is brought in under “Bring in what exists”, where its contents are shown first.')
  }
  if (type.mime.startsWith('image/')) {
    return refuse(
      `A picture of this kind (${type.ext.toUpperCase()}) cannot be used here. Bring JPEG, PNG or WebP.`,
    )
  }
  return refuse(`This is ${article(type.ext)} ${type.ext.toUpperCase()} file by its content. ${WANTED}`)
}

/** Named .stl and nothing that is known: a binary STL with something behind it, or one that breaks off. */
function binaryStl(head: Buffer, bytes: number): Sniffed {
  if (bytes < STL_HEADER_BYTES || isText(head)) return refuse(sayRefusal({ ok: false, why: 'not-stl' }))
  const promised = head.readUInt32LE(STL_HEADER_BYTES - 4)
  const present = Math.floor((bytes - STL_HEADER_BYTES) / STL_FACET_BYTES)
  if (promised > PLAUSIBLE_FACETS) return refuse(sayRefusal({ ok: false, why: 'not-stl' }))
  if (promised === 0) return refuse(sayRefusal({ ok: false, why: 'no-facets' }))
  if (present < promised) return refuse(sayRefusal({ ok: false, why: 'truncated', promised, present }))
  return { ok: true, kind: 'model', mediaType: 'model/stl' }
}

const refuse = (sentence: string): Sniffed => ({ ok: false, sentence })
const article = (word: string): string => (/^[aefhilmnorsx8]/i.test(word) ? 'an' : 'a')

const isExactStl = (head: Buffer, bytes: number): boolean =>
  bytes > STL_HEADER_BYTES &&
  head.readUInt32LE(STL_HEADER_BYTES - 4) * STL_FACET_BYTES + STL_HEADER_BYTES === bytes

const isTextStl = (head: Buffer): boolean => /^\s*solid\b[^]*\bfacet\b/i.test(head.toString('latin1'))

const isSvg = (head: Buffer): boolean =>
  /^\uFEFF?\s*(<\?xml|<!--|<!doctype svg|<svg)[^]*<svg[\s>]|^\uFEFF?\s*<svg[\s>]/i.test(head.toString('utf8'))

const isText = (head: Buffer): boolean => head.every((byte) => byte >= 0x20 || (byte >= 0x09 && byte <= 0x0d))

async function headOf(file: string): Promise<Buffer> {
  const handle = await open(file, 'r')
  try {
    const buffer = Buffer.alloc(HEAD_BYTES)
    const { bytesRead } = await handle.read(buffer, 0, HEAD_BYTES, 0)
    return buffer.subarray(0, bytesRead)
  } finally {
    await handle.close()
  }
}
