import { Router } from 'express'
import type { Context } from '../../../context'
import { read } from './read'
import { save } from './save'
import { sayHere } from './sayHere'
import { settle } from './settle'

/** One working copy a guide: read, save, settle what two authors changed, see who else is there. */
export function draftRoutes(ctx: Context): Router {
  const router = Router()
  read(router, ctx)
  save(router, ctx)
  settle(router, ctx)
  sayHere(router, ctx)
  return router
}
