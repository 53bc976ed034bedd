import { Router } from 'express'
import {
  AcceptInvitation,
  ChangeRole,
  ChangeSiteRole,
  Invite,
  PeopleQuery,
  ReadInvitation,
} from '../../../shared/api/people'
import { limitTries } from '../../auth/limitTries'
import { permit, permitOnSite, signedIn } from '../../auth/person'
import type { Context } from '../../context'
import { cursorFrom, cursorOf } from '../../http/cursor'
import { parseBody, parseQuery } from '../../http/parse'
import { Problem } from '../../http/problem'
import { acceptInvitation, readInvitation } from './acceptInvitation'
import { changeRole, removePerson } from './changePeople'
import { invite } from './invite'
import { presentPeople, presentSitePerson } from './presentPeople'
import { listPeople, readSitePerson, setSiteRole, withdrawInvitation } from './repo'

const PAGE = 50

/** Who works on a guide, invitations to it, and the people of the site. */
export function peopleRoutes(ctx: Context): Router {
  const router = Router()
  guidePeople(router, ctx)
  invitations(router, ctx)
  sitePeople(router, ctx)
  return router
}

function guidePeople(router: Router, ctx: Context): void {
  router.get('/guides/:guideId/people', (req, res) => {
    res.json(presentPeople(ctx.db, permit(req, 'see', req.params.guideId), ctx.now()))
  })

  router.use('/guides/:guideId/invitations', limitTries({ perAccount: 60, perAddress: 240 }))
  router.post('/guides/:guideId/invitations', (req, res) => {
    const { guideId } = req.params
    invite(ctx, permit(req, 'manage', guideId), parseBody(Invite, req))
    res.status(201).json(presentPeople(ctx.db, permit(req, 'see', guideId), ctx.now()))
  })

  router.delete('/guides/:guideId/invitations/:invitationId', (req, res) => {
    const { guideId, invitationId } = req.params
    permit(req, 'manage', guideId)
    if (!withdrawInvitation(ctx.db, guideId, invitationId, ctx.now())) throw new Problem('not-found')
    res.json(presentPeople(ctx.db, permit(req, 'see', guideId), ctx.now()))
  })

  router.delete('/guides/:guideId/people/me', (req, res) => {
    const permitted = permit(req, 'leave', req.params.guideId)
    removePerson(ctx, permitted, permitted.person.id)
    res.status(204).end()
  })

  router.patch('/guides/:guideId/people/:userId', (req, res) => {
    const { guideId, userId } = req.params
    changeRole(ctx, permit(req, 'manage', guideId), userId, parseBody(ChangeRole, req))
    res.status(204).end()
  })

  router.delete('/guides/:guideId/people/:userId', (req, res) => {
    const { guideId, userId } = req.params
    removePerson(ctx, permit(req, 'manage', guideId), userId)
    res.status(204).end()
  })
}

function invitations(router: Router, ctx: Context): void {
  const tries = () => limitTries({ perAccount: 120, perAddress: 120 })

  router.post('/invitations/read', tries(), (req, res) => {
    res.json(readInvitation(ctx.db, parseBody(ReadInvitation, req).token, ctx.now()))
  })

  router.post('/invitations/accept', tries(), (req, res) => {
    res.json(acceptInvitation(ctx, signedIn(req), parseBody(AcceptInvitation, req)))
  })
}

function sitePeople(router: Router, ctx: Context): void {
  router.get('/people', (req, res) => {
    permitOnSite(req, 'curate')
    const { search, cursor } = parseQuery(PeopleQuery, req)
    const before = cursor === undefined ? undefined : cursorFrom(cursor)
    const rows = listPeople(ctx.db, { search, before, limit: PAGE + 1 })
    const shown = rows.slice(0, PAGE)
    const next = rows.length > PAGE ? cursorOf(shown.at(-1)!) : null
    res.json({ people: shown.map(presentSitePerson), next })
  })

  router.patch('/people/:userId', (req, res) => {
    const curator = permitOnSite(req, 'curate')
    const { role } = parseBody(ChangeSiteRole, req)
    const { userId } = req.params
    if (readSitePerson(ctx.db, userId) === undefined) throw new Problem('not-found')
    if (userId === curator.id) throw new Problem('own-role')
    setSiteRole(ctx.db, userId, role)
    res.json(presentSitePerson(readSitePerson(ctx.db, userId)!))
  })
}
