import { createServer } from 'node:http'
import { brotliCompressSync } from 'node:zlib'
import express from 'express'
import { fortySteps } from './fortySteps'
import { handWritten, STYLE } from './handWritten'

/**
 * A process of its own: `/express` is a bare Express handler that sends the page it was handed; the rest is the page written by hand,
 * with its style beside it or inside, packed beforehand as a static server does.
 */
const app = express()
const pages = new Map<string, string>()
app.put('/express', express.text({ limit: '10mb', type: '*/*' }), (req, res) => {
  pages.set('page', String(req.body))
  res.end()
})
app.get('/express', (_req, res) => {
  res.send(pages.get('page'))
})

const document = fortySteps()
const file = (type: string, text: string) => ({ type, bytes: brotliCompressSync(text) })
const files = new Map([
  ['/beside/', file('text/html; charset=utf-8', handWritten(document, { inside: false }))],
  ['/beside/style.css', file('text/css; charset=utf-8', STYLE)],
  ['/inside/', file('text/html; charset=utf-8', handWritten(document, { inside: true }))],
])

const server = createServer((req, res) => {
  const found = files.get(req.url ?? '')
  if (found === undefined) return app(req, res)
  res.writeHead(200, {
    'content-type': found.type,
    'content-encoding': 'br',
    'content-length': found.bytes.length,
  })
  res.end(found.bytes)
})
server.listen(0, '127.0.0.1', () => {
  const address = server.address()
  process.stdout.write(`port ${typeof address === 'object' && address !== null ? address.port : 0}\n`)
})
process.on('SIGTERM', () => process.exit(0))
