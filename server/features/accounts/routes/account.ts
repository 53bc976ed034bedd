import type { Router } from 'express'
import { ChangeAccount, ChangeEmail, DeleteAccount } from '../../../../shared/api/accounts'
import { asProblem } from '../../../auth/asProblem'
import type { Auth } from '../../../auth/auth'
import { headersOf } from '../../../auth/headersOf'
import { limitTries, mailTries } from '../../../auth/limitTries'
import { clearName, passCookies, showName } from '../../../auth/nameCookie'
import { signedIn } from '../../../auth/person'
import type { Context } from '../../../context'
import { parseBody } from '../../../http/parse'
import { askForNewEmail } from '../askForNewEmail'
import { deleteAccount } from '../deleteAccount'
import { ownData } from '../ownData'
import { presentAccount } from '../present'
import { proveOneself } from '../proveOneself'
import { readLeaving } from '../readLeaving'
import { changeOwn } from '../repo'

export function ownAccountRoutes(router: Router, ctx: Context, auth: Auth): void {
  router.get('/account', (req, res) => {
    res.json(presentAccount(ctx.db, signedIn(req).id))
  })

  router.patch('/account', (req, res) => {
    const person = signedIn(req)
    const change = parseBody(ChangeAccount, req)
    changeOwn(ctx.db, person.id, change, ctx.now())
    const account = presentAccount(ctx.db, person.id)
    showName(res, ctx.config, account)
    res.json(account)
  })

  router.post('/account/email', mailTries(), async (req, res) => {
    await askForNewEmail(ctx, signedIn(req), parseBody(ChangeEmail, req).email)
    res.status(202).json({ sent: true })
  })

  router.get('/account/data', async (req, res) => {
    const zip = await ownData(ctx.db, signedIn(req).id)
    res.attachment('quern-account.zip').type('application/zip').send(zip)
  })

  router.get('/account/leaving', (req, res) => {
    res.json(readLeaving(ctx.db, signedIn(req).id))
  })

  router.post('/account/deletion', limitTries({ perAccount: 10, perAddress: 60 }), async (req, res) => {
    const person = signedIn(req)
    const wanted = parseBody(DeleteAccount, req)
    await proveOneself(ctx, auth, headersOf(req), person, wanted.proof)
    deleteAccount(ctx, person, wanted)
    const { headers } = await asProblem(auth.api.signOut({ headers: headersOf(req), returnHeaders: true }))
    passCookies(res, headers)
    clearName(res, ctx.config)
    res.status(204).end()
  })
}
