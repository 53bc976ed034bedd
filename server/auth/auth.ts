import { betterAuth } from 'better-auth'
import { drizzleAdapter } from 'better-auth/adapters/drizzle'
import type { Config } from '../config'
import type { Db } from '../db/open'
import { accounts, sessions, users, verifications } from '../db/schema'

/** Accounts by better-auth: password, confirmation by mail, reset, sessions as cookies. */
export function createAuth(config: Config, db: Db) {
  return betterAuth({
    baseURL: config.appUrl,
    basePath: '/api/auth',
    secret: config.secret,
    database: drizzleAdapter(db, {
      provider: 'sqlite',
      schema: { user: users, session: sessions, account: accounts, verification: verifications },
    }),
    emailAndPassword: { enabled: true, minPasswordLength: 10 },
    telemetry: { enabled: false },
    advanced: { ipAddress: { ipAddressHeaders: ['x-forwarded-for'] } },
    user: {
      additionalFields: {
        role: { type: 'string', input: false },
        language: { type: 'string', input: true, required: false },
      },
    },
  })
}

export type Auth = ReturnType<typeof createAuth>
