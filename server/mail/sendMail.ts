import type { Context } from '../context'
import type { MailTransport } from './mailTransport'
import { noteAttempt, noteSent, noteTrouble, readMail, type MailRow } from './repo'

/** What nodemailer says of a server's answer. */
interface Answer {
  responseCode?: number
  response?: string
  command?: string
  rejectedErrors?: Answer[]
}

/**
 * Sends one mail of the table. The state is set after the mail was accepted: a process killed between the two sends it again,
 * with the same Message-ID, by which the receiver knows it. What the server refuses for good is marked; everything else throws,
 * so that the job tries again for as long as it takes.
 */
export async function sendMail(ctx: Context, transport: MailTransport, id: string): Promise<void> {
  const mail = readMail(ctx.db, id)
  // Deleted with its account, sent already, or refused: nothing to do.
  if (mail === undefined || mail.state !== 'waiting') return
  noteAttempt(ctx.db, id)
  try {
    await transport.send(messageOf(ctx, mail), fileNameOf(mail))
  } catch (caught) {
    const error = caught instanceof Error ? caught : new Error(String(caught))
    const refusal = refusalOf(error)
    noteTrouble(ctx.db, id, refusal === undefined ? 'waiting' : 'refused', refusal ?? error.message)
    if (refusal === undefined) throw error
    ctx.log.warn({ mail: id, refusal }, 'mail refused')
    return
  }
  noteSent(ctx.db, id, ctx.now())
}

function messageOf(ctx: Context, mail: MailRow) {
  const host = new URL(ctx.config.appUrl).hostname
  return {
    from: { name: 'Quern', address: senderOf(ctx.config.smtpUrl, host) },
    to: mail.recipient,
    subject: mail.subject,
    text: mail.text,
    html: mail.html,
    date: mail.createdAt,
    messageId: `<${mail.id}@${host}>`,
    textEncoding: 'quoted-printable' as const,
    // RFC 3834: no machine answers to a machine.
    headers: { 'Auto-Submitted': 'auto-generated', 'Content-Language': mail.language },
  }
}

/** The user of the mail server where that is an address (most servers accept no other sender), else no-reply at the site's host. */
function senderOf(smtpUrl: string | undefined, host: string): string {
  const user = smtpUrl === undefined ? '' : decodeURIComponent(new URL(smtpUrl).username)
  return user.includes('@') ? user : `no-reply@${host}`
}

const fileNameOf = (mail: MailRow): string =>
  `${mail.createdAt.toISOString().replace(/[:.]/g, '-')}-${mail.id}.eml`

/**
 * The server's words where it refuses this recipient or this message for good (5xx to RCPT TO or DATA, RFC 5321 section 4.2.1).
 * A 5xx to anything before (greeting, signing in, sender) is the site's own trouble and will pass when it is mended.
 */
function refusalOf(error: Error): string | undefined {
  const answer = error as Error & Answer
  const refused = answer.rejectedErrors?.[0] ?? answer
  const permanent = (refused.responseCode ?? 0) >= 500 && (refused.responseCode ?? 0) < 600
  const aboutThisMail = ['RCPT TO', 'DATA'].includes(answer.command ?? '')
  return permanent && aboutThisMail ? (refused.response ?? answer.message) : undefined
}
