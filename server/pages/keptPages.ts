import { createHash } from 'node:crypto'
import type { IncomingMessage, OutgoingHttpHeaders, ServerResponse } from 'node:http'
import { promisify } from 'node:util'
import { brotliCompress, constants, gzip } from 'node:zlib'

/** A page in every packing, with its etag and all of its headers. */
export interface PackedPage {
  etag: string
  headers: OutgoingHttpHeaders
  bodies: { identity: Buffer; gzip: Buffer; br: Buffer }
}

interface Kept extends PackedPage {
  mark: number
  until: number
}

/** A picture that gets a better rendition later is shown with it after this time at the latest. */
const KEPT_MS = 5 * 60_000
const MOST_BYTES = 64 * 1024 * 1024

const packGzip = promisify(gzip)
const packBrotli = promisify(brotliCompress)

/**
 * Packs a text, quickly for somebody who waits (some 5 ms for 160 KB) or as small as it gets for keeping (some 400 ms, a tenth smaller),
 * both beside the main thread. A cookie that was set meanwhile belongs to the one who asked and is not among the headers.
 */
export async function packPage(
  text: string,
  headers: OutgoingHttpHeaders,
  how: 'quickly' | 'small',
): Promise<PackedPage> {
  const identity = Buffer.from(text)
  const [zipped, br] = await Promise.all([
    packGzip(identity, { level: how === 'small' ? 9 : 4 }),
    packBrotli(identity, { params: { [constants.BROTLI_PARAM_QUALITY]: how === 'small' ? 11 : 4 } }),
  ])
  // The two packings of one text differ in their bytes, so they have etags of their own.
  const etag = `${createHash('sha256').update(identity).digest('base64url').slice(0, 22)}-${how}`
  const { 'set-cookie': _, ...shared } = headers
  return { etag, headers: shared, bodies: { identity, gzip: zipped, br } }
}

/**
 * Rendered pages, packed, with their etag: answered before Express is asked. A page is thrown away when a revision was published since
 * it was read (`mark` differs), after five minutes, or, the longest unused first, when together they grow past 64 MB.
 */
export class KeptPages {
  private readonly pages = new Map<string, Kept>()
  private readonly coming = new Set<string>()
  private bytes = 0

  constructor(
    private readonly mark: () => number,
    private readonly now: () => Date,
  ) {}

  /**
   * Keeps a page once it is packed; while that goes on, the same page asked for again is not packed twice. `mark` is what it was before
   * the page's data were read, so that a revision published meanwhile is not missed.
   */
  async keepWhenPacked(key: string, mark: number, pack: () => Promise<PackedPage>): Promise<void> {
    if (this.coming.has(key)) return
    this.coming.add(key)
    try {
      this.keep(key, mark, await pack())
    } finally {
      this.coming.delete(key)
    }
  }

  private keep(key: string, mark: number, page: PackedPage): void {
    this.drop(key)
    const kept = { ...page, mark, until: this.now().getTime() + KEPT_MS }
    this.pages.set(key, kept)
    this.bytes += sizeOf(kept)
    for (const oldest of this.pages.keys()) {
      if (this.bytes <= MOST_BYTES) break
      this.drop(oldest)
    }
  }

  find(key: string): PackedPage | undefined {
    const kept = this.pages.get(key)
    if (kept === undefined) return undefined
    if (kept.mark !== this.mark() || kept.until < this.now().getTime()) {
      this.drop(key)
      return undefined
    }
    this.pages.delete(key)
    this.pages.set(key, kept)
    return kept
  }

  private drop(key: string): void {
    const kept = this.pages.get(key)
    if (kept === undefined) return
    this.bytes -= sizeOf(kept)
    this.pages.delete(key)
  }
}

const sizeOf = ({ bodies }: Kept): number => bodies.identity.length + bodies.gzip.length + bodies.br.length

/** RFC 9110, 12.5.3: a packing is taken when it is named and not refused by a weight of nought. */
const takes = (accepted: string, packing: string): boolean =>
  new RegExp(`\\b${packing}\\b(?!\\s*;\\s*q=0(?:\\.0*)?\\s*(?:,|$))`).test(accepted)

/** Answers with a packed page: 304 where the reader has it, else the smallest body that the reader can unpack. */
export function answerPacked(
  req: IncomingMessage,
  res: ServerResponse,
  page: PackedPage,
  status = 200,
): void {
  const accepted = String(req.headers['accept-encoding'] ?? '')
  const packing = takes(accepted, 'br') ? 'br' : takes(accepted, 'gzip') ? 'gzip' : 'identity'
  const etag = `"${page.etag}-${packing}"`
  const headers: OutgoingHttpHeaders = { ...page.headers, etag }
  if (
    String(req.headers['if-none-match'] ?? '')
      .split(/\s*,\s*/)
      .some((known) => known.replace(/^W\//, '') === etag)
  ) {
    res.writeHead(304, headers).end()
    return
  }
  const body = page.bodies[packing]
  if (packing !== 'identity') headers['content-encoding'] = packing
  headers['content-length'] = body.length
  res.writeHead(status, headers)
  res.end(req.method === 'HEAD' ? undefined : body)
}
