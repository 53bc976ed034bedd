import { Router } from 'express'
import type { Context } from '../../../context'
import { list } from './list'
import { publish } from './publish'

/** Publishing the draft as a revision, and the list of what was published. */
export function revisionRoutes(ctx: Context): Router {
  const router = Router()
  publish(router, ctx)
  list(router, ctx)
  return router
}
