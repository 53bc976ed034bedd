import type { Auth } from '../../auth/auth'

/** Whom the cookies of an answer sign in, if anybody. */
export async function signedInBy(auth: Auth, answer: Headers): Promise<{ name: string } | undefined> {
  const cookies = answer.getSetCookie().map((cookie) => cookie.split(';', 1)[0])
  if (cookies.length === 0) return undefined
  const session = await auth.api.getSession({ headers: new Headers({ cookie: cookies.join('; ') }) })
  return session?.user
}
