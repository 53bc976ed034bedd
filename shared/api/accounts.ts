import { z } from 'zod'
import { SITE_ROLES } from '../access/ability'

export const PASSWORD_MIN = 10
export const PASSWORD_MAX = 200
export const PASSWORD_SENTENCE =
  'Take 10 to 200 characters; a few words that have nothing to do with each other are good.'

/** Languages that the site's interface and its mails are written in. */
export const INTERFACE_LANGUAGES = ['en', 'ar'] as const

/** An address in lower case, without blanks around it. */
export const Email = z
  .string()
  .trim()
  .toLowerCase()
  .max(254, 'Give an e-mail address such as name@example.org.')
  .pipe(z.email('Give an e-mail address such as name@example.org.'))

const PersonName = z
  .string()
  .trim()
  .min(1, 'Give the name under which you publish.')
  .max(120, 'Give a name of at most 120 characters.')
const NewPassword = z.string().min(PASSWORD_MIN, PASSWORD_SENTENCE).max(PASSWORD_MAX, PASSWORD_SENTENCE)
const Token = z.string().min(1).max(2000)
/** A path of this site to go on to: one slash at its start, so that no other site can be meant. */
export const NextPath = z
  .string()
  .max(500)
  .regex(/^\/(?![/\\])/)

/** POST /api/accounts: 202 whether or not the address has an account; the mail tells its owner which it is. */
export const SignUp = z.object({
  name: PersonName,
  email: Email,
  password: NewPassword,
  language: z.enum(INTERFACE_LANGUAGES),
})
export type SignUp = z.infer<typeof SignUp>

/** POST /api/accounts/confirmation (send the mail again), /api/sessions/link, /api/passwords/reset: 202, known address or not. */
export const AskForMail = z.object({ email: Email, next: NextPath.optional() })
export type AskForMail = z.infer<typeof AskForMail>
export const MailAsked = z.object({ sent: z.literal(true) })

/** POST /api/accounts/confirmed: a sign-up or a new address, by the token of its mail. Signs a new person in. */
export const UseToken = z.object({ token: Token })

/** POST /api/sessions */
export const SignIn = z.object({
  email: Email,
  password: z.string().min(1, 'Give your password.').max(PASSWORD_MAX),
})
export type SignIn = z.infer<typeof SignIn>

/** POST /api/passwords: a new password by the token of the mail; ends all sessions. */
export const ResetPassword = z.object({ token: Token, password: NewPassword })

/** GET /api/account; the answer of every way to sign in. */
export const Account = z.object({
  id: z.string(),
  name: z.string(),
  email: z.string(),
  language: z.string(),
  role: z.enum(SITE_ROLES),
  hasPassword: z.boolean(),
})
export type Account = z.infer<typeof Account>

/** PATCH /api/account */
export const ChangeAccount = z.object({
  name: PersonName.optional(),
  language: z.enum(INTERFACE_LANGUAGES).optional(),
})

/** PUT /api/account/password. `current` may be empty only where there is no password yet. Ends all other sessions. */
export const ChangePassword = z.object({ current: z.string().max(PASSWORD_MAX), password: NewPassword })

/** POST /api/account/email: 202; changes when the new address was confirmed. The old one has a notice. */
export const ChangeEmail = z.object({ email: Email })

/** GET /api/account/sessions. `browser` and `system` are names as people know them, null where they cannot be told. */
export const SessionEntry = z.object({
  id: z.string(),
  current: z.boolean(),
  browser: z.string().nullable(),
  system: z.string().nullable(),
  address: z.string().nullable(),
  createdAt: z.iso.datetime(),
  usedAt: z.iso.datetime(),
})
export type SessionEntry = z.infer<typeof SessionEntry>
export const SessionList = z.object({ sessions: z.array(SessionEntry) })

/** GET /api/account/leaving: the guides that somebody who leaves must decide about. */
export const LeavingGuide = z.object({
  guideId: z.string(),
  title: z.string(),
  published: z.boolean(),
  /** Others who own it too: it stays with them and nothing is asked. */
  owners: z.array(z.string()),
  /** Others who work on it: one of them can become its owner. */
  heirs: z.array(z.object({ userId: z.string(), name: z.string() })),
})
export type LeavingGuide = z.infer<typeof LeavingGuide>
export const Leaving = z.object({ guides: z.array(LeavingGuide), revisions: z.number().int() })
export type Leaving = z.infer<typeof Leaving>

/**
 * POST /api/account/deletion. `proof` is the password, or the own address where there is no password. One entry for every guide of
 * `leaving` without another owner: to an heir, to "former member", or removed (only what was never published).
 */
export const DeleteAccount = z.object({
  proof: z.string().min(1, 'Give your password, so that nobody else can do this.').max(PASSWORD_MAX),
  guides: z.array(
    z.discriminatedUnion('to', [
      z.object({ guideId: z.string(), to: z.literal('heir'), userId: z.string() }),
      z.object({ guideId: z.string(), to: z.literal('former member') }),
      z.object({ guideId: z.string(), to: z.literal('removed') }),
    ]),
  ),
  /** Whether published revisions go on naming their author. */
  name: z.enum(['keep', 'former member']),
})
export type DeleteAccount = z.infer<typeof DeleteAccount>

/** GET /api/demo/accounts: nobody, and no password, outside of demo mode. */
export const DemoAccounts = z.object({
  password: z.string().default(''),
  accounts: z.array(z.object({ name: z.string(), email: z.string(), role: z.enum(SITE_ROLES) })),
})
export type DemoAccounts = z.infer<typeof DemoAccounts>
