import { Router } from 'express'
import type { Auth } from '../auth/auth'
import type { Context } from '../context'
import { handleFileJobs } from '../files/handleFileJobs'
import { handleGuideJobs } from '../guides/handleGuideJobs'
import { handleMailJobs } from '../mail/handleMailJobs'
import { accountRoutes } from './accounts/routes'
import { draftRoutes } from './drafts/routes'
import { fileRoutes } from './files/routes'
import { guideRoutes } from './guides/routes'
import { handleImportJobs } from './importing/handleImportJobs'
import { importRoutes } from './importing/routes'
import { mailRoutes } from './mail/routes'
import { peopleRoutes } from './people/routes'
import { revisionRoutes } from './revisions/routes'

/** The routes of every feature under /api, in one readable list. */
export function featureRoutes(ctx: Context, auth: Auth): Router {
  const router = Router()
  router.use(accountRoutes(ctx, auth))
  router.use(mailRoutes(ctx))
  router.use(peopleRoutes(ctx))
  router.use(guideRoutes(ctx))
  router.use(draftRoutes(ctx))
  router.use(fileRoutes(ctx))
  router.use(revisionRoutes(ctx))
  router.use(importRoutes(ctx))
  return router
}

/** The work of every feature that outlives a request, by kind of job. Called once before the queue starts. */
export function featureJobs(ctx: Context): void {
  handleMailJobs(ctx)
  handleFileJobs(ctx)
  handleGuideJobs(ctx)
  handleImportJobs(ctx)
}
