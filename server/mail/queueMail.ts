import type { Context } from '../context'
import type { Tx } from '../db/open'
import { composeMail, type MailTemplate, type MailValues } from './composeMail'
import { insertMail } from './repo'

export interface MailToQueue<Template extends MailTemplate> {
  to: string
  language: string
  template: Template
  values: MailValues[Template]
}

/**
 * Writes a mail and the job that sends it, inside the transaction that causes it: neither is there without the other, and a killed
 * process loses nothing.
 */
export function queueMail<Template extends MailTemplate>(
  tx: Tx,
  ctx: Context,
  mail: MailToQueue<Template>,
): void {
  const id = ctx.newId()
  insertMail(tx, {
    id,
    recipient: mail.to,
    ...composeMail(mail.template, mail.values, mail.language, ctx.config.appUrl),
    state: 'waiting',
    createdAt: ctx.now(),
  })
  queueSending(tx, ctx, id)
}

export function queueSending(tx: Tx, ctx: Context, id: string): void {
  ctx.jobs.add(tx, 'send-mail', { id }, { key: `send-mail:${id}` })
}
