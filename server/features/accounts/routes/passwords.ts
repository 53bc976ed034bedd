import type { Router } from 'express'
import { AskForMail, ChangePassword, ResetPassword } from '../../../../shared/api/accounts'
import { asProblem } from '../../../auth/asProblem'
import type { Auth } from '../../../auth/auth'
import { headersOf } from '../../../auth/headersOf'
import { limitTries, mailTries } from '../../../auth/limitTries'
import { clearName, passCookies } from '../../../auth/nameCookie'
import { signedIn } from '../../../auth/person'
import { hasPassword } from '../../../auth/repo'
import type { Context } from '../../../context'
import { parseBody } from '../../../http/parse'
import { queueMail } from '../../../mail/queueMail'
import { presentAccount } from '../present'
import { unhurried } from '../unhurried'

export function passwordRoutes(router: Router, ctx: Context, auth: Auth): void {
  router.post('/passwords/reset', mailTries(), async (req, res) => {
    const { email } = parseBody(AskForMail, req)
    await unhurried(() => asProblem(auth.api.requestPasswordReset({ body: { email } })))
    res.status(202).json({ sent: true })
  })

  router.post('/passwords', mailTries(), async (req, res) => {
    const { token, password } = parseBody(ResetPassword, req)
    await asProblem(auth.api.resetPassword({ body: { token, newPassword: password } }))
    clearName(res, ctx.config)
    res.status(204).end()
  })

  router.put('/account/password', limitTries({ perAccount: 10, perAddress: 60 }), async (req, res) => {
    const person = signedIn(req)
    const { current, password } = parseBody(ChangePassword, req)
    const headers = headersOf(req)
    if (hasPassword(ctx.db, person.id)) {
      const changed = await asProblem(
        auth.api.changePassword({
          body: { currentPassword: current, newPassword: password, revokeOtherSessions: true },
          headers,
          returnHeaders: true,
        }),
      )
      passCookies(res, changed.headers)
    } else {
      await asProblem(auth.api.setPassword({ body: { newPassword: password }, headers }))
      await asProblem(auth.api.revokeOtherSessions({ headers }))
    }
    ctx.db.transaction((tx) =>
      queueMail(tx, ctx, {
        to: person.email,
        language: person.language,
        template: 'passwordChanged',
        values: { name: person.name, link: '/account', when: ctx.now() },
      }),
    )
    res.json(presentAccount(ctx.db, person.id))
  })
}
