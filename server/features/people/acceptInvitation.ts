import type { Invitation } from '../../../shared/api/people'
import { readUser, type SignedIn } from '../../auth/repo'
import type { Context } from '../../context'
import type { Tx } from '../../db/open'
import { Problem } from '../../http/problem'
import { hashOf } from './invite'
import { titleOf } from './presentPeople'
import { addRole, readInvitationByHash, takeInvitation, type InvitationRow } from './repo'

/** What an invitation is for. @throws Problem not-found for a token that nobody handed out */
export function readInvitation(tx: Tx, token: string, now: Date): Invitation {
  const row = known(tx, token)
  const { email, role, language } = row
  const invitedBy = row.invitedBy === null ? null : (readUser(tx, row.invitedBy)?.name ?? null)
  return { guideTitle: titleOf(tx, row.guideId), invitedBy, email, role, language, state: stateOf(row, now) }
}

/**
 * Gives the person the role, once. @throws Problem not-found; invitation-over; other-address where it went to another address and
 * the person has not said that this is meant
 */
export function acceptInvitation(
  ctx: Context,
  person: SignedIn,
  { token, otherAddress }: { token: string; otherAddress: boolean },
): { guideId: string } {
  return ctx.db.transaction((tx) => {
    const row = known(tx, token)
    const now = ctx.now()
    if (stateOf(row, now) !== 'open') throw new Problem('invitation-over')
    if (row.email !== person.email && !otherAddress) {
      throw new Problem('other-address', { invited: row.email, yours: person.email })
    }
    if (!takeInvitation(tx, row.id, now)) throw new Problem('invitation-over')
    addRole(tx, row.guideId, person.id, { role: row.role, language: row.language }, now)
    return { guideId: row.guideId }
  })
}

function known(tx: Tx, token: string): InvitationRow {
  const row = readInvitationByHash(tx, hashOf(token))
  if (row === undefined) throw new Problem('not-found')
  return row
}

function stateOf(row: InvitationRow, now: Date): Invitation['state'] {
  if (row.acceptedAt !== null) return 'accepted'
  if (row.withdrawnAt !== null) return 'withdrawn'
  return row.expiresAt <= now ? 'expired' : 'open'
}
