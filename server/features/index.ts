import { Router } from 'express'
import type { Auth } from '../auth/auth'
import type { Context } from '../context'
import { handleMailJobs } from '../mail/handleMailJobs'

/** The routes of every feature under /api, in one readable list. */
export function featureRoutes(_ctx: Context, _auth: Auth): Router {
  const router = Router()
  return router
}

/** The work of every feature that outlives a request, by kind of job. Called once before the queue starts. */
export function featureJobs(ctx: Context): void {
  handleMailJobs(ctx)
}
