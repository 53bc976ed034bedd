import { Router } from 'express'
import type { Context } from '../../../context'
import { bring } from './bring'
import { change } from './change'
import { look } from './look'
import { remove } from './remove'
import { take } from './take'

/** Bringing in what exists: files come in, what was understood of them is looked over, and only then becomes a guide. */
export function importRoutes(ctx: Context): Router {
  const router = Router()
  bring(router, ctx)
  look(router, ctx)
  change(router, ctx)
  take(router, ctx)
  remove(router, ctx)
  return router
}
