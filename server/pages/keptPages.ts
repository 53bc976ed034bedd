import { createHash } from 'node:crypto'
import type { IncomingMessage, OutgoingHttpHeaders, ServerResponse } from 'node:http'
import { promisify } from 'node:util'
import { brotliCompress, constants, gzip } from 'node:zlib'

interface Kept {
  etag: string
  headers: OutgoingHttpHeaders
  bodies: { identity: Buffer; gzip: Buffer; br: Buffer }
  mark: number
  until: number
}

/** A picture that gets a better rendition later is shown with it after this time at the latest. */
const KEPT_MS = 5 * 60_000
const MOST_BYTES = 64 * 1024 * 1024

const packGzip = promisify(gzip)
const packBrotli = promisify(brotliCompress)

/**
 * Rendered pages, packed, with their etag: answered before Express is asked. A page is thrown away when a revision was published since
 * (`mark` differs), after five minutes, or, the longest unused first, when together they grow past 64 MB.
 */
export class KeptPages {
  private readonly pages = new Map<string, Kept>()
  private bytes = 0

  constructor(
    private readonly mark: () => number,
    private readonly now: () => Date,
  ) {}

  async keep(key: string, html: string, headers: OutgoingHttpHeaders): Promise<Kept> {
    const identity = Buffer.from(html)
    const [zipped, br] = await Promise.all([
      packGzip(identity, { level: 9 }),
      packBrotli(identity, { params: { [constants.BROTLI_PARAM_QUALITY]: 9 } }),
    ])
    const etag = createHash('sha256').update(identity).digest('base64url').slice(0, 22)
    const kept = {
      etag,
      headers,
      bodies: { identity, gzip: zipped, br },
      mark: this.mark(),
      until: this.now().getTime() + KEPT_MS,
    }
    this.drop(key)
    this.pages.set(key, kept)
    this.bytes += sizeOf(kept)
    for (const oldest of this.pages.keys()) {
      if (this.bytes <= MOST_BYTES) break
      this.drop(oldest)
    }
    return kept
  }

  find(key: string): Kept | undefined {
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

/** Answers with a kept page: 304 where the reader has it, else the smallest body that the reader can unpack. */
export function answerKept(req: IncomingMessage, res: ServerResponse, kept: Kept, status = 200): void {
  const accepted = String(req.headers['accept-encoding'] ?? '')
  const packing = /\bbr\b/.test(accepted) ? 'br' : /\bgzip\b/.test(accepted) ? 'gzip' : 'identity'
  const etag = `"${kept.etag}-${packing}"`
  const headers: OutgoingHttpHeaders = {
    ...kept.headers,
    etag,
    'cache-control': 'public, max-age=0, must-revalidate',
  }
  if (
    String(req.headers['if-none-match'] ?? '')
      .split(/\s*,\s*/)
      .some((known) => known.replace(/^W\//, '') === etag)
  ) {
    res.writeHead(304, headers).end()
    return
  }
  const body = kept.bodies[packing]
  if (packing !== 'identity') headers['content-encoding'] = packing
  headers['content-length'] = body.length
  res.writeHead(status, headers)
  res.end(req.method === 'HEAD' ? undefined : body)
}
