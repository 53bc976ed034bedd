import { createServer } from 'node:http'
import { createApp } from './app'
import { ConfigError, readConfig, type Config } from './config'
import { createContext } from './context'
import { featureJobs } from './features'
import { createPages } from './pages/pages'

/** How long requests and jobs in hand may take after SIGTERM before the process ends all the same. */
const STOP_WITHIN_MS = 20_000

function configOrExit(): Config {
  try {
    return readConfig(process.env)
  } catch (error) {
    if (!(error instanceof ConfigError)) throw error
    process.stderr.write(`Quern cannot start:\n${error.message}\n`)
    process.exit(1)
  }
}

const config = configOrExit()
const ctx = createContext(config)
const server = createServer()
const pages = await createPages(ctx, server)
const app = createApp(ctx, pages)
server.on('request', (req, res) => {
  if (!pages.serveKept(req, res)) app(req, res)
})
featureJobs(ctx)
ctx.jobs.start()

server.once('error', (error: NodeJS.ErrnoException) => {
  const why =
    error.code === 'EADDRINUSE' ? `Port ${config.port} is in use. Set PORT to another.` : error.message
  process.stderr.write(`Quern cannot start:\n${why}\n`)
  process.exit(1)
})
server.listen(config.port, () => {
  const address = server.address()
  const port = typeof address === 'object' && address !== null ? address.port : config.port
  process.stdout.write(`Quern is at http://localhost:${port}\n`)
})

let stopping = false
function stop(): void {
  if (stopping) return
  stopping = true
  setTimeout(() => process.exit(1), STOP_WITHIN_MS).unref()
  server.close(() => {
    void Promise.all([pages.close(), ctx.close()]).then(() => process.exit(0))
  })
  server.closeIdleConnections()
}
process.on('SIGTERM', stop)
process.on('SIGINT', stop)
