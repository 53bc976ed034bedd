import type { Router } from 'express'
import { asProblem } from '../../../auth/asProblem'
import type { Auth } from '../../../auth/auth'
import { headersOf } from '../../../auth/headersOf'
import { sessionOf, signedIn } from '../../../auth/person'
import type { Context } from '../../../context'
import { Problem } from '../../../http/problem'
import { presentSession } from '../present'
import { listSessions, readSession } from '../repo'

export function sessionRoutes(router: Router, ctx: Context, auth: Auth): void {
  router.get('/account/sessions', (req, res) => {
    const current = sessionOf(req)
    const rows = listSessions(ctx.db, signedIn(req).id, ctx.now())
    res.json({ sessions: rows.map((row) => presentSession(row, current)) })
  })

  router.delete('/account/sessions/:sessionId', async (req, res) => {
    const session = readSession(ctx.db, signedIn(req).id, req.params.sessionId)
    if (session === undefined) throw new Problem('not-found')
    await asProblem(auth.api.revokeSession({ body: { token: session.token }, headers: headersOf(req) }))
    res.status(204).end()
  })

  router.delete('/account/sessions', async (req, res) => {
    signedIn(req)
    await asProblem(auth.api.revokeOtherSessions({ headers: headersOf(req) }))
    res.status(204).end()
  })
}
