import { Router } from 'express'
import type { Context } from '../../../context'
import { bring } from './bring'
import { look } from './look'

/** Bringing pictures and models in, and asking what became of them. Their addresses for readers are in server/files/serveFiles. */
export function fileRoutes(ctx: Context): Router {
  const router = Router()
  bring(router, ctx)
  look(router, ctx)
  return router
}
