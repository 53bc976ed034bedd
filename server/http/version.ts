import type { Request } from 'express'
import { Problem } from './problem'

export const etagOf = (version: number): string => `"${version}"`

/** The version that a write was made from. @throws Problem etag-missing without If-Match, bad-request for one of another form. */
export function versionFrom(req: Request): number {
  const given = req.headers['if-match']
  if (given === undefined) throw new Problem('etag-missing')
  const version = /^"(\d{1,15})"$/.exec(given.trim())?.[1]
  if (version === undefined) {
    const message = 'If-Match must hold the version as the ETag header had it, such as "12".'
    throw new Problem('bad-request', {}, [{ path: ['If-Match'], message }])
  }
  return Number(version)
}
