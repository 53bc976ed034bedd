import { Router } from 'express'
import { MailQuery } from '../../../shared/api/mail'
import { permitOnSite } from '../../auth/person'
import type { Context } from '../../context'
import { cursorFrom, cursorOf } from '../../http/cursor'
import { parseQuery } from '../../http/parse'
import { Problem } from '../../http/problem'
import { queueSending } from '../../mail/queueMail'
import { listMails, readMail, waitAgain } from '../../mail/repo'
import { presentMail, presentMailDetails } from './present'

const PAGE = 50

/** Mails that the site wrote, for curators. */
export function mailRoutes(ctx: Context): Router {
  const router = Router()
  const toServer = ctx.config.smtpUrl !== undefined

  const details = (mailId: string) => {
    const mail = readMail(ctx.db, mailId)
    if (mail === undefined) throw new Problem('not-found')
    return presentMailDetails(mail, toServer)
  }

  router.get('/mails', (req, res) => {
    permitOnSite(req, 'curate')
    const { state, cursor } = parseQuery(MailQuery, req)
    const before = cursor === undefined ? undefined : cursorFrom(cursor)
    const rows = listMails(ctx.db, { state, before, limit: PAGE + 1 })
    const shown = rows.slice(0, PAGE)
    const next = rows.length > PAGE ? cursorOf(shown.at(-1)!) : null
    res.json({ mails: shown.map(presentMail), next, toServer })
  })

  router.get('/mails/:mailId', (req, res) => {
    permitOnSite(req, 'curate')
    res.json(details(req.params.mailId))
  })

  router.post('/mails/:mailId/send-again', (req, res) => {
    permitOnSite(req, 'curate')
    const { mailId } = req.params
    details(mailId)
    ctx.db.transaction((tx) => {
      if (!waitAgain(tx, mailId)) throw new Problem('not-refused')
      queueSending(tx, ctx, mailId)
    })
    res.json(details(mailId))
  })

  return router
}
