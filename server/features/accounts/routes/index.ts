import { Router } from 'express'
import type { Auth } from '../../../auth/auth'
import type { Context } from '../../../context'
import { ownAccountRoutes } from './account'
import { passwordRoutes } from './passwords'
import { sessionRoutes } from './sessions'
import { signInRoutes } from './signIn'
import { signUpRoutes } from './signUp'

/** Signing up and in, and what a person does with their own account. */
export function accountRoutes(ctx: Context, auth: Auth): Router {
  const router = Router()
  signUpRoutes(router, ctx, auth)
  signInRoutes(router, ctx, auth)
  passwordRoutes(router, ctx, auth)
  ownAccountRoutes(router, ctx, auth)
  sessionRoutes(router, ctx, auth)
  return router
}
