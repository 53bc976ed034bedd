import { readdirSync, readFileSync } from 'node:fs'
import path from 'node:path'
import { Router } from 'express'
import { answerPacked, packPage, type PackedPage } from './keptPages'

const TYPES: Record<string, string> = {
  '.js': 'text/javascript; charset=utf-8',
  '.css': 'text/css; charset=utf-8',
}

/**
 * Scripts and style sheets of the build, packed when they are first asked for. Their names hold a hash of what is in them, so that a
 * browser keeps them for ever. What is not text (typefaces) goes on to the next handler.
 */
export function packedFiles(folder: string): Router {
  const router = Router()
  const names = new Set(readdirSync(folder))
  const packed = new Map<string, PackedPage>()
  router.get('/:name', async (req, res, next) => {
    const { name } = req.params
    const type = TYPES[path.extname(name)]
    if (type === undefined || !names.has(name)) return next()
    res.type(type).vary('Accept-Encoding').set('cache-control', 'public, max-age=31536000, immutable')
    const known = packed.get(name)
    if (known !== undefined) return answerPacked(req, res, known)
    const text = readFileSync(path.join(folder, name), 'utf8')
    const headers = { ...res.getHeaders() }
    const quick = await packPage(text, headers, 'quickly')
    answerPacked(req, res, quick)
    if (packed.has(name)) return
    packed.set(name, quick)
    packed.set(name, await packPage(text, headers, 'small'))
  })
  return router
}
