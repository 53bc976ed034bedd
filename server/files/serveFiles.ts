import { pipeline } from 'node:stream/promises'
import { Router, type Request, type Response } from 'express'
import type { Context } from '../context'
import { Problem } from '../http/problem'
import { readFile, readRendition } from './repo'

const FOR_EVER = 'public, max-age=31536000, immutable'
/** A still is drawn by the site; should anything else ever get into one, it runs nothing and loads nothing. */
const SVG_POLICY = "default-src 'none'; style-src 'unsafe-inline'; sandbox"

/**
 * GET /files/:sha256 (a model as it was brought in) and /files/:sha256/:rendition. Anybody who knows a hash may read: a published
 * guide's files need no account. A picture as brought in has no address, for what its EXIF says. An address never changes its bytes.
 */
export function serveFiles(ctx: Context): Router {
  const router = Router()
  router.get('/:sha256', async (req, res) => {
    const asset = isHash(req.params.sha256) ? readFile(ctx.db, req.params.sha256) : undefined
    if (asset === undefined || asset.kind !== 'model') throw new Problem('not-found')
    res.attachment(asset.name)
    await send(ctx, req, res, { file: asset.sha256, mediaType: 'model/stl', bytes: asset.bytes })
  })
  router.get('/:sha256/:rendition', async (req, res) => {
    const { sha256, rendition } = req.params
    const found = isHash(sha256) ? readRendition(ctx.db, sha256, rendition) : undefined
    if (found === undefined) throw new Problem('not-found')
    if (found.mediaType === 'image/svg+xml') res.set('Content-Security-Policy', SVG_POLICY)
    await send(ctx, req, res, found)
  })
  return router
}

const isHash = (text: string): boolean => /^[0-9a-f]{64}$/.test(text)

async function send(
  ctx: Context,
  req: Request,
  res: Response,
  { file, mediaType, bytes }: { file: string; mediaType: string; bytes: number },
): Promise<void> {
  res.set({ 'Cache-Control': FOR_EVER, ETag: `"${file}"`, 'Content-Type': mediaType })
  if (req.fresh) {
    res.status(304).end()
    return
  }
  res.set('Content-Length', String(bytes))
  if (req.method === 'HEAD') {
    res.end()
    return
  }
  try {
    await pipeline(ctx.storage.read(file), res)
  } catch (error) {
    // A reader who goes away in the middle is no fault.
    if ((error as NodeJS.ErrnoException).code !== 'ERR_STREAM_PREMATURE_CLOSE') throw error
  }
}
