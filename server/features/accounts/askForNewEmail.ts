import { createEmailVerificationToken } from 'better-auth/api'
import { wrongField } from '../../auth/asProblem'
import { readUserByEmail, type SignedIn } from '../../auth/repo'
import type { Context } from '../../context'
import { queueMail } from '../../mail/queueMail'

const HOLDS_SECONDS = 24 * 3600

/**
 * Sends the link that changes the address to the new one, and a notice to the old one, in one transaction. An address that has an
 * account already is told so itself; the answer and the notice are the same, so that nobody learns who has an account here.
 */
export async function askForNewEmail(ctx: Context, person: SignedIn, newEmail: string): Promise<void> {
  if (newEmail === person.email) throw wrongField('email', 'This is your address already.')
  const token = await createEmailVerificationToken(ctx.config.secret, person.email, newEmail, HOLDS_SECONDS, {
    requestType: 'change-email-verification',
    userId: person.id,
  })
  const { name, language } = person
  ctx.db.transaction((tx) => {
    const owner = readUserByEmail(tx, newEmail)
    if (owner === undefined) {
      const values = { name, link: `/confirm?token=${token}` }
      queueMail(tx, ctx, { to: newEmail, language, template: 'newEmail', values })
    } else {
      const values = { name: owner.name, link: '/sign-in' }
      queueMail(tx, ctx, { to: newEmail, language: owner.language, template: 'already', values })
    }
    const values = { name, link: '/account', newEmail }
    queueMail(tx, ctx, { to: person.email, language, template: 'emailNotice', values })
  })
}
