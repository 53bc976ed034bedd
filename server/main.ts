import { createServer } from 'node:http'
import { createApp } from './app'
import { hasPeople } from './auth/repo'
import { ConfigError, readConfig, type Config } from './config'
import { createContext } from './context'
import { lockDataDir } from './db/lockDataDir'
import { featureJobs } from './features'
import { createPages } from './pages/pages'

/** How long requests and jobs in hand may take after SIGTERM before the process ends all the same. */
const STOP_WITHIN_MS = 20_000

function endWith(why: string): never {
  process.stderr.write(`Quern cannot start:\n${why}\n`)
  process.exit(1)
}

function configOrExit(): Config {
  try {
    return readConfig(process.env)
  } catch (error) {
    if (!(error instanceof ConfigError)) throw error
    return endWith(error.message)
  }
}

const config = configOrExit()
const unlock =
  lockDataDir(config.dataDir) ||
  endWith(`Another server works on ${config.dataDir}. Stop it, or set DATA_DIR to another folder.`)

const ctx = createContext(config)
const server = createServer()
const pages = await createPages(ctx, server)
const app = createApp(ctx, pages)
server.on('request', (req, res) => {
  if (!pages.serveKept(req, res)) app(req, res)
})
featureJobs(ctx)
if (config.demo && !hasPeople(ctx.db)) {
  const { loadDemo } = await import('./demo/loadDemo')
  await loadDemo(ctx)
}
ctx.jobs.start()

server.once('error', (error: NodeJS.ErrnoException) => {
  endWith(error.code === 'EADDRINUSE' ? `Port ${config.port} is in use. Set PORT to another.` : error.message)
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
  // Connections become idle one by one, as their requests are answered.
  setInterval(() => server.closeIdleConnections(), 200).unref()
  const requests = new Promise((resolve) => server.close(resolve))
  void Promise.all([requests, ctx.jobs.stop()])
    .then(() => Promise.all([pages.close(), ctx.close()]))
    .then(() => {
      unlock()
      process.exit(0)
    })
}
process.on('SIGTERM', stop)
process.on('SIGINT', stop)
