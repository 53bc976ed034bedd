import { isAPIError } from 'better-auth/api'
import { PASSWORD_SENTENCE } from '../../shared/api/accounts'
import { Problem } from '../http/problem'

/** Which field of the request holds the password that may be wrong, and which the new one that may be too short. */
interface Fields {
  wrong?: string
  weak?: string
}

/** better-auth's refusals as the site's own. What is not known here goes on as it is and is logged as the site's mistake. */
export async function asProblem<Answer>(ask: Promise<Answer>, fields: Fields = {}): Promise<Answer> {
  try {
    return await ask
  } catch (error) {
    if (!isAPIError(error)) throw error
    throw problemOf(error, fields)
  }
}

function problemOf(error: { statusCode?: number; body?: { code?: string } }, fields: Fields): unknown {
  const code = error.body?.code ?? ''
  switch (code) {
    case 'INVALID_EMAIL_OR_PASSWORD':
    case 'INVALID_EMAIL':
    case 'FAILED_TO_CREATE_SESSION':
      return new Problem('wrong-password')
    case 'INVALID_PASSWORD':
      return wrongField(fields.wrong ?? 'current', 'This is not your password.')
    case 'EMAIL_NOT_VERIFIED':
      return new Problem('not-confirmed')
    case 'PASSWORD_TOO_SHORT':
    case 'PASSWORD_TOO_LONG':
      return wrongField(fields.weak ?? 'password', PASSWORD_SENTENCE)
    case 'INVALID_TOKEN':
    case 'TOKEN_EXPIRED':
    case 'USER_NOT_FOUND':
    case 'INVALID_USER':
      return new Problem('link-spent')
    default:
      // A mailed link that is spent is answered by a redirect to an error page, of which there is none here.
      return error.statusCode === 302 ? new Problem('link-spent') : error
  }
}

export const wrongField = (field: string, message: string): Problem =>
  new Problem('bad-request', {}, [{ path: [field], message }])
