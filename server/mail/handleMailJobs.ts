import type { Context } from '../context'
import { mailTransport } from './mailTransport'
import { sendMail } from './sendMail'

/** Registers the job that sends mail. It never gives up: a mail server that is down for a week has the mail on the eighth day. */
export function handleMailJobs(ctx: Context): void {
  const transport = mailTransport(ctx.config)
  ctx.jobs.handle<{ id: string }>('send-mail', ({ id }) => sendMail(ctx, transport, id), {
    attempts: Number.POSITIVE_INFINITY,
  })
}
