import type { CookieOptions, Response } from 'express'
import type { Config } from '../config'

const NAME = 'quern_name'
const HOLDS_MS = 30 * 24 * 3600_000

/**
 * The person's name in a cookie that scripts may read, so that a kept page can greet without asking the server. It is for show
 * alone: no permission ever hangs on it.
 */
export function showName(res: Response, config: Config, name: string): void {
  res.cookie(NAME, name, { ...options(config), maxAge: HOLDS_MS })
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
