import type { Request, RequestHandler } from 'express'
import { ipKeyGenerator, rateLimit } from 'express-rate-limit'
import { Problem } from '../http/problem'

const WINDOW_MINUTES = 15

/** How often one address of the network, and one account as it is named in the body, may try within a quarter of an hour. */
interface Tries {
  perAccount: number
  perAddress: number
}

/** Slows down guessing of passwords and flooding of mailboxes. The count is the same for accounts that do not exist. */
export function limitTries({ perAccount, perAddress }: Tries): RequestHandler {
  const limit = (most: number, keyOf: (req: Request) => string): RequestHandler =>
    rateLimit({
      windowMs: WINDOW_MINUTES * 60_000,
      limit: most,
      keyGenerator: keyOf,
      standardHeaders: 'draft-8',
      legacyHeaders: false,
      handler: (_req, _res, next) => next(new Problem('too-many-tries', { minutes: WINDOW_MINUTES })),
    })
  const byAddress = limit(perAddress, (req) => ipKeyGenerator(req.ip ?? ''))
  const byAccount = limit(perAccount, (req) => `${ipKeyGenerator(req.ip ?? '')} ${emailIn(req.body)}`)
  return (req, res, next) =>
    byAddress(req, res, (error?: unknown) => (error === undefined ? byAccount(req, res, next) : next(error)))
}

const emailIn = (body: unknown): string =>
  typeof body === 'object' && body !== null && 'email' in body && typeof body.email === 'string'
    ? body.email.trim().toLowerCase().slice(0, 320)
    : ''

/** For everything that sends a mail or spends a mailed token. */
export const mailTries = (): RequestHandler => limitTries({ perAccount: 6, perAddress: 120 })
