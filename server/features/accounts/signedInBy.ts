import type { Account } from '../../../shared/api/accounts'
import type { Auth } from '../../auth/auth'
import type { Tx } from '../../db/open'
import { presentAccount } from './present'

/** Whom the cookies of an answer sign in, if anybody. */
export async function signedInBy(tx: Tx, auth: Auth, answer: Headers): Promise<Account | undefined> {
  const cookies = answer.getSetCookie().map((cookie) => cookie.split(';', 1)[0])
  if (cookies.length === 0) return undefined
  const session = await auth.api.getSession({ headers: new Headers({ cookie: cookies.join('; ') }) })
  return session === null ? undefined : presentAccount(tx, session.user.id)
}
