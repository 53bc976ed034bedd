import type { Router } from 'express'
import { DEMO_PASSWORD } from '../../../../shared/access/demoAddress'
import { AskForMail, SignIn, UseToken } from '../../../../shared/api/accounts'
import { asProblem } from '../../../auth/asProblem'
import type { Auth } from '../../../auth/auth'
import { headersOf } from '../../../auth/headersOf'
import { limitTries, mailTries } from '../../../auth/limitTries'
import { clearName, passCookies, showName } from '../../../auth/nameCookie'
import type { Context } from '../../../context'
import { parseBody } from '../../../http/parse'
import { presentAccount } from '../present'
import { listDemoAccounts } from '../repo'
import { unhurried } from '../unhurried'

export function signInRoutes(router: Router, ctx: Context, auth: Auth): void {
  router.post('/sessions', limitTries({ perAccount: 10, perAddress: 200 }), async (req, res) => {
    const body = parseBody(SignIn, req)
    const { headers, response } = await asProblem(
      auth.api.signInEmail({ body, headers: headersOf(req), returnHeaders: true }),
    )
    passCookies(res, headers)
    const account = presentAccount(ctx.db, response.user.id)
    showName(res, ctx.config, account)
    res.json(account)
  })

  router.post('/sessions/link', mailTries(), async (req, res) => {
    const { email, next } = parseBody(AskForMail, req)
    const metadata = next === undefined ? {} : { next }
    await unhurried(() =>
      asProblem(auth.api.signInMagicLink({ body: { email, metadata }, headers: headersOf(req) })),
    )
    res.status(202).json({ sent: true })
  })

  router.post('/sessions/by-link', mailTries(), async (req, res) => {
    const { token } = parseBody(UseToken, req)
    const { headers, response } = await asProblem(
      auth.api.magicLinkVerify({ query: { token }, headers: headersOf(req), returnHeaders: true }),
    )
    passCookies(res, headers)
    const account = presentAccount(ctx.db, response.user.id)
    showName(res, ctx.config, account)
    res.json(account)
  })

  router.delete('/sessions/current', async (req, res) => {
    const { headers } = await asProblem(auth.api.signOut({ headers: headersOf(req), returnHeaders: true }))
    passCookies(res, headers)
    clearName(res, ctx.config)
    res.status(204).end()
  })

  router.get('/demo/accounts', (_req, res) => {
    const { demo } = ctx.config
    res.json(demo ? { password: DEMO_PASSWORD, accounts: listDemoAccounts(ctx.db) } : { accounts: [] })
  })
}
