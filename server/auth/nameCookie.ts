import type { CookieOptions, Response } from 'express'
import type { Config } from '../config'

const NAME = 'quern_name'
const LANGUAGE = 'quern_language'
const HOLDS_MS = 30 * 24 * 3600_000

/**
 * The person's name in a cookie that scripts may read, so that a kept page can greet without asking the server, and beside it the
 * language of the interface. They are for show alone: no permission ever hangs on them.
 */
export function showName(res: Response, config: Config, person: { name: string; language: string }): void {
  const kept = { ...options(config), maxAge: HOLDS_MS }
  res.cookie(NAME, person.name, kept)
  res.cookie(LANGUAGE, person.language, kept)
}

export function clearName(res: Response, config: Config): void {
  res.clearCookie(NAME, options(config))
}

const options = (config: Config): CookieOptions => ({
  path: '/',
  sameSite: 'lax',
  secure: config.appUrl.startsWith('https:'),
})

/** Hands on the cookies that better-auth sets. */
export function passCookies(res: Response, headers: Headers): void {
  for (const cookie of headers.getSetCookie()) res.append('Set-Cookie', cookie)
}
