import type { MailDetails, MailEntry } from '../../../shared/api/mail'
import type { MailRow } from '../../mail/repo'

export function presentMail(row: MailRow): MailEntry {
  const { id, recipient, subject, language, state, attempts, error } = row
  return {
    id,
    recipient,
    subject,
    language,
    state,
    attempts,
    error,
    createdAt: row.createdAt.toISOString(),
    sentAt: row.sentAt?.toISOString() ?? null,
  }
}

export function presentMailDetails(row: MailRow, hideSecrets: boolean): MailDetails {
  const show = (body: string): string => (hideSecrets ? withoutSecrets(body) : body)
  return { ...presentMail(row), text: show(row.text), html: show(row.html) }
}

/** The part of a link that opens something: the token of an account's mail and of an invitation. */
const withoutSecrets = (body: string): string =>
  body.replace(/(token=|\/invitations\/)[^\s&"<]+/g, (_link, before: string) => `${before}…`)
