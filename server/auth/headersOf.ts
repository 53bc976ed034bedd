import { fromNodeHeaders } from 'better-auth/node'
import type { Request } from 'express'

/** The headers of a request for better-auth: the cookies, the browser's name, and the address as the connection has it. */
export function headersOf(req: Request): Headers {
  const headers = fromNodeHeaders({ cookie: req.headers.cookie, 'user-agent': req.headers['user-agent'] })
  if (req.ip !== undefined) headers.set('x-quern-address', req.ip)
  return headers
}
