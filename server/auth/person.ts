import type { NextFunction, Request, Response } from 'express'
import type { Context } from '../context'
import { mayOnGuide, mayOnSite, type GuideAction, type SiteAction } from '../../shared/access/ability'
import { isDemoAddress } from '../../shared/access/demoAddress'
import { Problem } from '../http/problem'
import type { Auth } from './auth'
import { headersOf } from './headersOf'
import { clearName, passCookies, showName } from './nameCookie'
import { readPerson, type SignedIn } from './repo'

interface Asking {
  person: SignedIn
  sessionId: string
}
const asking = new WeakMap<Request, Asking>()

/** Notes who asks. A request without a session goes on as a reader's. */
export function whoAsks(ctx: Context, auth: Auth) {
  return async (req: Request, res: Response, next: NextFunction): Promise<void> => {
    if (req.headers.cookie !== undefined && !isFromElsewhere(req)) {
      const { response: session, headers } = await auth.api.getSession({
        headers: headersOf(req),
        returnHeaders: true,
      })
      // A session that was prolonged gets its cookie anew; one that is over loses it, and the name with it.
      passCookies(res, headers)
      const person = session === null ? undefined : readPerson(ctx.db, session.user.id)
      if (session !== null && person !== undefined && (ctx.config.demo || !isDemoAddress(person.email))) {
        asking.set(req, { person, sessionId: session.session.id })
        if (headers.getSetCookie().length > 0 || !req.headers.cookie.includes('quern_name=')) {
          showName(res, ctx.config, person)
        }
      } else if (req.headers.cookie.includes('quern_name=')) clearName(res, ctx.config)
    }
    next()
  }
}

/** A write that another site's page makes the browser send is nobody's: the cookies' SameSite=Lax keeps most away, this the rest. */
const isFromElsewhere = (req: Request): boolean =>
  req.method !== 'GET' && req.method !== 'HEAD' && req.headers['sec-fetch-site'] === 'cross-site'

export const personOf = (req: Request): SignedIn | null => asking.get(req)?.person ?? null

/** @throws Problem not-signed-in */
export function signedIn(req: Request): SignedIn {
  const person = personOf(req)
  if (person === null) throw new Problem('not-signed-in')
  return person
}

/** The session by which somebody asks. @throws Problem not-signed-in */
export function sessionOf(req: Request): string {
  const sessionId = asking.get(req)?.sessionId
  if (sessionId === undefined) throw new Problem('not-signed-in')
  return sessionId
}

declare const permitted: unique symbol
/** A guide's id on which this action was allowed: services accept nothing else, so a forgotten check does not compile. */
export type Permitted<Action extends GuideAction> = {
  guideId: string
  person: SignedIn
  readonly [permitted]: Action
}

/**
 * Asks whether the person may do this to the guide. @throws Problem not-signed-in; not-found for somebody who may not even see
 * the draft, so that private guides do not show; not-allowed for somebody who sees it but lacks the role.
 */
export function permit<Action extends GuideAction>(
  req: Request,
  action: Action,
  guideId: string,
): Permitted<Action> {
  return permitPerson(signedIn(req), action, guideId)
}

/** The same where there is no request: for work that is done in somebody's name. */
export function permitPerson<Action extends GuideAction>(
  person: SignedIn,
  action: Action,
  guideId: string,
): Permitted<Action> {
  if (!mayOnGuide(person, action, guideId)) {
    throw new Problem(mayOnGuide(person, 'see', guideId) ? 'not-allowed' : 'not-found')
  }
  return { guideId, person } as Permitted<Action>
}

/** Asks whether the person may do this on the site. @throws Problem not-signed-in or not-allowed */
export function permitOnSite(req: Request, action: SiteAction): SignedIn {
  const person = signedIn(req)
  if (!mayOnSite(person, action)) throw new Problem('not-allowed')
  return person
}
