import { fromNodeHeaders } from 'better-auth/node'
import type { NextFunction, Request, Response } from 'express'
import type { Context } from '../context'
import { mayOnGuide, mayOnSite, type GuideAction, type SiteAction } from '../../shared/access/ability'
import { Problem } from '../http/problem'
import type { Auth } from './auth'
import { readPerson, type SignedIn } from './repo'

const people = new WeakMap<Request, SignedIn>()

/** Notes who asks. A request without a session goes on as a reader's. */
export function whoAsks(ctx: Context, auth: Auth) {
  return async (req: Request, _res: Response, next: NextFunction): Promise<void> => {
    if (req.headers.cookie !== undefined) {
      const session = await auth.api.getSession({ headers: fromNodeHeaders(req.headers) })
      const person = session === null ? undefined : readPerson(ctx.db, session.user.id)
      if (person !== undefined) people.set(req, person)
    }
    next()
  }
}

export const personOf = (req: Request): SignedIn | null => people.get(req) ?? null

/** @throws Problem not-signed-in */
export function signedIn(req: Request): SignedIn {
  const person = personOf(req)
  if (person === null) throw new Problem('not-signed-in')
  return person
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
  const person = signedIn(req)
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
