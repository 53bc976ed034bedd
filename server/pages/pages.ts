import { readFileSync } from 'node:fs'
import type { IncomingMessage, Server, ServerResponse } from 'node:http'
import path from 'node:path'
import express, { Router } from 'express'
import type { ViteDevServer } from 'vite'
import type { RenderPage } from '../../shared/api/pages'
import type { Context } from '../context'
import { rootDir } from '../db/open'
import { pageRoutes } from './routes'

/** Pages as documents: rendered for readers, a shell for the application. */
export interface Pages {
  router: Router
  /** Answers a page that is kept packed, before Express sees it. @returns false where there is none. */
  serveKept: (req: IncomingMessage, res: ServerResponse) => boolean
  close: () => Promise<void>
}

/** How pages are rendered and where the browser's files are: built in production, from Vite's middleware in development. */
export interface Renderer {
  render: () => Promise<RenderPage>
  /** The whole HTML of the application's shell for this address. */
  shell: (url: string) => Promise<string>
}

export async function createPages(ctx: Context, server: Server): Promise<Pages> {
  const router = Router()
  const vite = ctx.config.production ? undefined : await startVite(server, ctx.config.port)
  const renderer = vite === undefined ? builtRenderer(router) : viteRenderer(vite)
  const { routes, serveKept } = pageRoutes(ctx, renderer)
  router.use(routes)
  if (vite !== undefined) router.use(vite.middlewares)
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

function viteRenderer(vite: ViteDevServer): Renderer {
  return {
    render: async () => (await vite.ssrLoadModule('/src/app/renderPage.tsx')).renderPage as RenderPage,
    shell: async (url) =>
      vite.transformIndexHtml(url, readFileSync(path.join(rootDir(), 'src/app/shell.html'), 'utf8')),
  }
}

function builtRenderer(router: Router): Renderer {
  const client = path.join(rootDir(), 'dist/client')
  router.use(
    '/assets',
    express.static(path.join(client, 'assets'), { immutable: true, maxAge: '1y', index: false }),
  )
  router.use(express.static(path.join(client, 'static'), { maxAge: '1h', index: false }))
  const shell = readFileSync(path.join(client, 'src/app/shell.html'), 'utf8')
  const entry = path.join(rootDir(), 'dist/server/renderPage.js')
  const loaded = import(entry) as Promise<{ renderPage: RenderPage }>
  return { render: async () => (await loaded).renderPage, shell: () => Promise.resolve(shell) }
}
