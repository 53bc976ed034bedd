import type { IncomingMessage, ServerResponse } from 'node:http'
import { Router } from 'express'
import type { Context } from '../context'
import type { Renderer } from './pages'

/** Addresses that the application draws in the browser. */
const APPLICATION = [
  '/sign-in',
  '/sign-in/link',
  '/sign-up',
  '/confirm',
  '/reset',
  '/invitations/:token',
  '/account',
  '/account/*rest',
  '/drafts',
  '/drafts/*rest',
  '/people',
  '/mail',
  '/mail/:mailId',
]

/** The addresses of all pages: reading pages first, then the application's shell for its own. */
export function pageRoutes(
  _ctx: Context,
  renderer: Renderer,
): { routes: Router; serveKept: (req: IncomingMessage, res: ServerResponse) => boolean } {
  const routes = Router()
  routes.get(APPLICATION, async (req, res) => {
    res.type('html').send(await renderer.shell(req.originalUrl))
  })
  return { routes, serveKept: () => false }
}
