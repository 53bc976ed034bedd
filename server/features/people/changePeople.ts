import type { ChangeRole } from '../../../shared/api/people'
import type { Permitted } from '../../auth/person'
import type { Context } from '../../context'
import type { Tx } from '../../db/open'
import { Problem } from '../../http/problem'
import { addRole, countOwners, hasRole, removeMember, removeRole } from './repo'

/** One role of a person becomes another. @throws Problem not-found, last-owner */
export function changeRole(
  ctx: Context,
  { guideId }: Permitted<'manage'>,
  userId: string,
  { from, to }: ChangeRole,
): void {
  ctx.db.transaction((tx) => {
    if (!hasRole(tx, guideId, userId, from)) throw new Problem('not-found')
    keepingAnOwner(tx, guideId, () => {
      removeRole(tx, guideId, userId, from)
      addRole(tx, guideId, userId, to, ctx.now())
    })
  })
}

/** Takes all roles of a person, by an owner or by the person. @throws Problem not-found, last-owner */
export function removePerson(
  ctx: Context,
  { guideId }: Permitted<'manage'> | Permitted<'leave'>,
  userId: string,
): void {
  ctx.db.transaction((tx) => {
    keepingAnOwner(tx, guideId, () => {
      if (!removeMember(tx, guideId, userId)) throw new Problem('not-found')
    })
  })
}

/**
 * Asked after the change, inside its transaction: two owners who leave at once do not both succeed. A guide of a former member has
 * no owner before either, and who works on it can still leave.
 */
function keepingAnOwner(tx: Tx, guideId: string, change: () => void): void {
  const owners = countOwners(tx, guideId)
  change()
  if (owners > 0 && countOwners(tx, guideId) === 0) throw new Problem('last-owner')
}
