import { betterAuth } from 'better-auth'
import { drizzleAdapter } from 'better-auth/adapters/drizzle'
import { magicLink } from 'better-auth/plugins'
import { PASSWORD_MAX, PASSWORD_MIN } from '../../shared/api/accounts'
import { isDemoAddress } from '../../shared/access/demoAddress'
import type { Context } from '../context'
import { accounts, sessions, users, verifications } from '../db/schema'
import { queueMail } from '../mail/queueMail'
import { markConfirmed, nameFirstCurator, readUser, readUserByEmail } from './repo'

const DAY = 24 * 3600
const LINK_HOLDS_MIN = 15

/**
 * Accounts by better-auth: password, confirmation by mail, sign-in by mailed link, reset, sessions as cookies. Its own HTTP handler
 * is not mounted: features/accounts asks `auth.api` behind the site's contracts, limits and problem details, so that there is one
 * door. Links in mails lead to pages of the application, which send the token on; a mail scanner that opens the link spends nothing.
 */
export function createAuth(ctx: Context) {
  const { config, db } = ctx
  return betterAuth({
    baseURL: config.appUrl,
    basePath: '/api/auth',
    secret: config.secret,
    database: drizzleAdapter(db, {
      provider: 'sqlite',
      schema: { user: users, session: sessions, account: accounts, verification: verifications },
      // The driver is synchronous and takes no asynchronous transactions; each statement stands alone.
      transaction: false,
    }),
    telemetry: { enabled: false },
    logger: {
      level: 'error',
      log: (level, message) => ctx.log[level]({ from: 'better-auth' }, message),
    },
    emailAndPassword: {
      enabled: true,
      requireEmailVerification: true,
      minPasswordLength: PASSWORD_MIN,
      maxPasswordLength: PASSWORD_MAX,
      revokeSessionsOnPasswordReset: true,
      resetPasswordTokenExpiresIn: 3600,
      sendResetPassword: async ({ user, token }) => {
        db.transaction((tx) =>
          queueMail(tx, ctx, {
            to: user.email,
            language: languageOf(user),
            template: 'reset',
            values: { name: user.name, link: `/reset?token=${token}` },
          }),
        )
      },
      onPasswordReset: async ({ user }) => {
        db.transaction((tx) => {
          // The token came by mail: the address is proven by it.
          markConfirmed(tx, user.id)
          nameFirstCurator(tx, user.id, config.demo)
          queueMail(tx, ctx, {
            to: user.email,
            language: languageOf(user),
            template: 'passwordChanged',
            values: { name: user.name, link: '/account', when: ctx.now() },
          })
        })
      },
      onExistingUserSignUp: async ({ user }) => {
        db.transaction((tx) =>
          queueMail(tx, ctx, {
            to: user.email,
            language: languageOf(user),
            template: 'already',
            values: { name: user.name, link: '/sign-in' },
          }),
        )
      },
    },
    emailVerification: {
      expiresIn: DAY,
      autoSignInAfterVerification: true,
      sendVerificationEmail: async ({ user, token }) => {
        db.transaction((tx) =>
          queueMail(tx, ctx, {
            to: user.email,
            language: languageOf(user),
            template: 'confirm',
            values: { name: user.name, link: `/confirm?token=${token}` },
          }),
        )
      },
    },
    plugins: [
      magicLink({
        expiresIn: LINK_HOLDS_MIN * 60,
        disableSignUp: true,
        storeToken: 'hashed',
        sendMagicLink: async ({ email, token, metadata }) => {
          const user = readUserByEmail(db, email)
          if (user === undefined) return
          const next =
            typeof metadata?.['next'] === 'string' ? `&next=${encodeURIComponent(metadata['next'])}` : ''
          db.transaction((tx) =>
            queueMail(tx, ctx, {
              to: user.email,
              language: user.language,
              template: 'signInLink',
              values: { name: user.name, link: `/sign-in/link?token=${token}${next}` },
            }),
          )
        },
      }),
    ],
    verification: { storeIdentifier: { default: 'plain', overrides: { 'reset-password:': 'hashed' } } },
    session: { expiresIn: 30 * DAY, updateAge: DAY },
    advanced: {
      cookiePrefix: 'quern',
      useSecureCookies: config.appUrl.startsWith('https:'),
      defaultCookieAttributes: { httpOnly: true, sameSite: 'lax' },
      // Set by auth/headersOf from the connection, never taken over from the client.
      ipAddress: { ipAddressHeaders: ['x-quern-address'], ipv6Subnet: 128 },
      database: { generateId: () => ctx.newId() },
    },
    user: {
      changeEmail: { enabled: true },
      additionalFields: {
        role: { type: 'string', input: false, required: false, defaultValue: 'member' },
        language: { type: 'string', input: true, required: false, defaultValue: 'en' },
      },
    },
    databaseHooks: {
      user: {
        update: {
          after: async (user) => {
            if (user.emailVerified) db.transaction((tx) => nameFirstCurator(tx, user.id, config.demo))
          },
        },
      },
      session: {
        create: {
          // The demo's passwords are public: outside of demo mode nobody signs in with them.
          before: async (session) => {
            const user = readUser(db, session.userId)
            return config.demo || user === undefined || !isDemoAddress(user.email) ? undefined : false
          },
        },
      },
    },
  })
}

export type Auth = ReturnType<typeof createAuth>

const languageOf = (user: object): string =>
  'language' in user && typeof user.language === 'string' ? user.language : 'en'
