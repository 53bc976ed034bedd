import { createHash, randomBytes } from 'node:crypto'
import { INVITATION_DAYS, type Invite } from '../../../shared/api/people'
import type { Permitted } from '../../auth/person'
import { readUserByEmail } from '../../auth/repo'
import type { Context } from '../../context'
import { Problem } from '../../http/problem'
import { queueMail } from '../../mail/queueMail'
import { titleOf } from './presentPeople'
import { hasRole, insertInvitation, withdrawSame } from './repo'

const DAY_MS = 24 * 3600_000

/** What is kept of a token: enough to know it again, not enough to use it. */
export const hashOf = (token: string): string => createHash('sha256').update(token).digest('hex')

/**
 * Invites an address to a role, by mail, in one transaction. The token is only in the mail. @throws Problem already-member
 */
export function invite(ctx: Context, { guideId, person }: Permitted<'manage'>, wanted: Invite): void {
  const { email, role, language } = wanted
  const token = randomBytes(32).toString('base64url')
  const now = ctx.now()
  ctx.db.transaction((tx) => {
    const known = readUserByEmail(tx, email)
    if (known !== undefined && hasRole(tx, guideId, known.id, { role, language })) {
      throw new Problem('already-member', { email })
    }
    withdrawSame(tx, guideId, email, { role, language }, now)
    insertInvitation(tx, {
      id: ctx.newId(),
      guideId,
      email,
      role,
      language,
      tokenHash: hashOf(token),
      invitedBy: person.id,
      createdAt: now,
      expiresAt: new Date(now.getTime() + INVITATION_DAYS * DAY_MS),
    })
    queueMail(tx, ctx, {
      to: email,
      // A stranger's language is not known: that of who invites is the best guess.
      language: known?.language ?? person.language,
      template: 'invitation',
      values: {
        link: `/invitations/${token}`,
        inviter: person.name,
        guide: titleOf(tx, guideId),
        role,
        translationLanguage: language,
      },
    })
  })
}
