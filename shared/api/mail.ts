import { z } from 'zod'

export const MAIL_STATES = ['waiting', 'sent', 'refused'] as const
export type MailState = (typeof MAIL_STATES)[number]

/** A mail of the site. `error` is what the mail server said at the last try. */
export const MailEntry = z.object({
  id: z.string(),
  recipient: z.string(),
  subject: z.string(),
  language: z.string(),
  state: z.enum(MAIL_STATES),
  attempts: z.number().int(),
  error: z.string().nullable(),
  createdAt: z.iso.datetime(),
  sentAt: z.iso.datetime().nullable(),
})
export type MailEntry = z.infer<typeof MailEntry>

/** GET /api/mails?state=…&cursor=…, newest first, for curators. */
export const MailQuery = z.object({
  state: z.enum(MAIL_STATES).optional(),
  cursor: z.string().max(100).optional(),
})
export const MailPage = z.object({
  mails: z.array(MailEntry),
  next: z.string().nullable(),
  /** Whether mails go to a mail server; otherwise they are files in the data folder. */
  toServer: z.boolean(),
})
export type MailPage = z.infer<typeof MailPage>

/**
 * GET /api/mails/:mailId, POST /api/mails/:mailId/send-again (refused ones only). Where mails go to a server, the secret part of
 * links is replaced: a curator sees that a mail went and what it said, and cannot open an account by it.
 */
export const MailDetails = MailEntry.extend({ text: z.string(), html: z.string() })
export type MailDetails = z.infer<typeof MailDetails>
