import express, { type ErrorRequestHandler, type Express, type Router } from 'express'
import { rateLimit } from 'express-rate-limit'
import helmet from 'helmet'
import { pinoHttp } from 'pino-http'
import { createAuth } from './auth/auth'
import { whoAsks } from './auth/person'
import type { Context } from './context'
import { featureRoutes } from './features'
import { serveFiles } from './files/serveFiles'
import { Problem } from './http/problem'
import type { Pages } from './pages/pages'

/** The Express app, built from a context so that a test builds the same one with its own. */
export function createApp(ctx: Context, pages: Pages): Express {
  const app = express()
  app.disable('x-powered-by')
  app.set('trust proxy', 'loopback')
  app.use(
    pinoHttp({
      logger: ctx.log,
      autoLogging: { ignore: (req) => !(req.url ?? '').startsWith('/api/') },
      // No headers: the cookies in them open accounts.
      serializers: {
        req: ({ id, method, url }: { id: unknown; method: string; url: string }) => ({ id, method, url }),
        res: ({ statusCode }: { statusCode: number }) => ({ statusCode }),
      },
    }),
  )
  app.use(
    helmet({
      contentSecurityPolicy: {
        directives: {
          defaultSrc: ["'self'"],
          scriptSrc: ["'self'", "'wasm-unsafe-eval'", ...(ctx.config.production ? [] : ["'unsafe-inline'"])],
          styleSrc: ["'self'", "'unsafe-inline'"],
          imgSrc: ["'self'", 'data:', 'blob:'],
          connectSrc: ["'self'", 'blob:', ...(ctx.config.production ? [] : ['ws:'])],
          workerSrc: ["'self'", 'blob:'],
          fontSrc: ["'self'"],
          objectSrc: ["'none'"],
          baseUri: ["'none'"],
          frameAncestors: ["'none'"],
          formAction: ["'self'"],
          upgradeInsecureRequests: ctx.config.appUrl.startsWith('https:') ? [] : null,
        },
      },
      strictTransportSecurity: ctx.config.appUrl.startsWith('https:'),
    }),
  )
  // Before anybody is asked who they are: pictures are read by everybody, and there are many of them.
  app.use('/files', serveFiles(ctx))
  const auth = createAuth(ctx)
  app.use(
    '/api',
    rateLimit({
      windowMs: 60_000,
      limit: 1200,
      standardHeaders: 'draft-8',
      legacyHeaders: false,
      handler: (_req, _res, next) => next(new Problem('too-many')),
    }),
    // An answer is for the one who asked, at this moment. A browser that kept it would show a draft as it was.
    (_req, res, next) => {
      res.set('Cache-Control', 'no-store')
      next()
    },
  )
  app.use(whoAsks(ctx, auth))
  app.use('/api', express.json({ limit: '20mb' }), featureRoutes(ctx, auth) satisfies Router)
  app.use('/api', () => {
    throw new Problem('not-found')
  })
  app.use(pages.router)
  app.use(problems(ctx))
  return app
}

/** Every error becomes problem details; what was not meant as an answer is logged and shown without its inside. */
function problems(ctx: Context): ErrorRequestHandler {
  return (error: unknown, req, res, next) => {
    if (res.headersSent) {
      next(error)
      return
    }
    const problem = asProblem(error)
    if (problem.status >= 500) ctx.log.error({ err: error, url: req.url }, 'request failed')
    res.status(problem.status).type('application/problem+json').send(JSON.stringify(problem.details()))
  }
}

function asProblem(error: unknown): Problem {
  if (error instanceof Problem) return error
  // Drizzle wraps what SQLite says in some of its own errors.
  for (let at: unknown = error; at instanceof Error; at = at.cause) {
    if (hasField(at, 'code', 'ENOSPC') || hasField(at, 'code', 'SQLITE_FULL')) {
      return new Problem('no-space', {}, [], { cause: error })
    }
  }
  if (hasField(error, 'type', 'entity.too.large')) {
    return new Problem('too-large', { limit: '20 MB' }, [], { cause: error })
  }
  // What Express and its parsers refuse: broken JSON, an address with a broken escape, an unknown encoding.
  if (hasField(error, 'status', 400) || hasField(error, 'status', 415)) {
    return new Problem('bad-request', {}, [], { cause: error })
  }
  return new Problem('internal', {}, [], { cause: error })
}

const hasField = (error: unknown, field: string, value: unknown): boolean =>
  error instanceof Error && (error as Error & Record<string, unknown>)[field] === value
