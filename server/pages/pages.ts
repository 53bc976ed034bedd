import type { IncomingMessage, Server, ServerResponse } from 'node:http'
import { Router } from 'express'
import type { ViteDevServer } from 'vite'
import type { Context } from '../context'
import { rootDir } from '../db/open'
import { builtRenderer, viteRenderer } from './renderer'
import { missingPage, pageRoutes } from './routes'

/** Pages as documents: rendered for readers, a shell for the application. */
export interface Pages {
  router: Router
  /** Answers a page that is kept packed, before Express sees it. @returns false where there is none. */
  serveKept: (req: IncomingMessage, res: ServerResponse) => boolean
  close: () => Promise<void>
}

export async function createPages(ctx: Context, server: Server): Promise<Pages> {
  const router = Router()
  const vite = ctx.config.production ? undefined : await startVite(server, ctx.config.port)
  const renderer = vite === undefined ? builtRenderer(router) : viteRenderer(vite)
  const { routes, serveKept } = pageRoutes(ctx, renderer)
  router.use(routes)
  if (vite !== undefined) router.use(vite.middlewares)
  router.get('/*rest', missingPage(ctx, renderer))
  return { router, serveKept, close: async () => vite?.close() }
}

async function startVite(server: Server, port: number): Promise<ViteDevServer> {
  const { createServer } = await import('vite')
  return createServer({
    root: rootDir(),
    // Two servers in development at once would spoil each other's prepared packages.
    cacheDir: `node_modules/.vite/${port}`,
    server: { middlewareMode: true, hmr: { server } },
    appType: 'custom',
  })
}
