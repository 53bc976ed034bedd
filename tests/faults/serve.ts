import { createServer } from 'node:http'
import { Router } from 'express'
import { createApp } from '../../server/app'
import { readConfig } from '../../server/config'
import { createContext } from '../../server/context'
import { featureJobs } from '../../server/features'

/** The server without its pages, which would have to be built first: what is killed here is the interface and its jobs. */
const config = readConfig(process.env)
const ctx = createContext(config)
const app = createApp(ctx, { router: Router(), serveKept: () => false, close: () => Promise.resolve() })
featureJobs(ctx)
const server = createServer(app)
ctx.jobs.start()
server.listen(config.port, '127.0.0.1', () => process.stdout.write('ready\n'))
process.on('SIGTERM', () => {
  server.close()
  server.closeAllConnections()
  void ctx.close().then(() => process.exit(0))
})
