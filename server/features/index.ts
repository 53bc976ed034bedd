import { Router } from 'express'
import type { Auth } from '../auth/auth'
import type { Context } from '../context'

/** The routes of every feature under /api, in one readable list. */
export function featureRoutes(_ctx: Context, _auth: Auth): Router {
  const router = Router()
  return router
}
