import type { Router } from 'express'
import { AskForMail, SignUp, UseToken } from '../../../../shared/api/accounts'
import { asProblem } from '../../../auth/asProblem'
import type { Auth } from '../../../auth/auth'
import { headersOf } from '../../../auth/headersOf'
import { mailTries } from '../../../auth/limitTries'
import { passCookies, showName } from '../../../auth/nameCookie'
import { dropUnconfirmed } from '../../../auth/repo'
import type { Context } from '../../../context'
import { parseBody } from '../../../http/parse'
import { signedInBy } from '../signedInBy'
import { unhurried } from '../unhurried'

export function signUpRoutes(router: Router, ctx: Context, auth: Auth): void {
  router.post('/accounts', mailTries(), async (req, res) => {
    const body = parseBody(SignUp, req)
    await unhurried(async () => {
      dropUnconfirmed(ctx.db, body.email)
      await asProblem(auth.api.signUpEmail({ body, headers: headersOf(req) }))
    })
    res.status(202).json({ sent: true })
  })

  router.post('/accounts/confirmation', mailTries(), async (req, res) => {
    const { email } = parseBody(AskForMail, req)
    // Without the caller's cookies: whoever is signed in may ask for any address and learns nothing of it.
    await unhurried(() => asProblem(auth.api.sendVerificationEmail({ body: { email } })))
    res.status(202).json({ sent: true })
  })

  router.post('/accounts/confirmed', mailTries(), async (req, res) => {
    const { token } = parseBody(UseToken, req)
    const { headers } = await asProblem(
      auth.api.verifyEmail({ query: { token }, headers: headersOf(req), returnHeaders: true }),
    )
    passCookies(res, headers)
    const person = await signedInBy(ctx.db, auth, headers)
    if (person !== undefined) showName(res, ctx.config, person)
    res.json({ signedIn: person !== undefined })
  })
}
