import { Router } from 'express'
import type { Context } from '../../../context'
import { list } from './list'
import { remove } from './remove'
import { start } from './start'

/** Starting, listing and removing guides. */
export function guideRoutes(ctx: Context): Router {
  const router = Router()
  start(router, ctx)
  list(router, ctx)
  remove(router, ctx)
  return router
}
