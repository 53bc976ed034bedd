import { FORMER_MEMBER } from '../../../shared/access/formerMember'
import type { DeleteAccount, LeavingGuide } from '../../../shared/api/accounts'
import type { SignedIn } from '../../auth/repo'
import type { Context } from '../../context'
import type { Tx } from '../../db/open'
import { Problem } from '../../http/problem'
import { deleteMailsTo } from '../../mail/repo'
import { queueMail } from '../../mail/queueMail'
import { readLeaving } from './readLeaving'
import { countOthers, deleteGuide, deleteUser, forgetAuthor, makeOwner, setByline } from './repo'

type Choice = DeleteAccount['guides'][number]

/**
 * Deletes an account and passes its guides on, all in one transaction. @throws Problem last-curator; bad-request naming each guide
 * for which the choice is missing or does not fit what the guide is by now.
 */
export function deleteAccount(ctx: Context, person: SignedIn, wanted: DeleteAccount): void {
  ctx.db.transaction(
    (tx) => {
      const others = countOthers(tx, person.id)
      if (person.role === 'curator' && others.curators === 0 && others.people > 0) {
        throw new Problem('last-curator')
      }
      const owned = readLeaving(tx, person.id).guides
      passOn(tx, ctx, owned, wanted.guides)
      if (wanted.name === 'former member') {
        forgetAuthor(tx, person.id, FORMER_MEMBER)
        const guideIds = person.guides.map(({ guideId }) => guideId)
        setByline(tx, guideIds, person.name, FORMER_MEMBER)
      }
      deleteUser(tx, person.id)
      deleteMailsTo(tx, person.email)
      queueMail(tx, ctx, {
        to: person.email,
        language: person.language,
        template: 'accountDeleted',
        values: { name: person.name, when: ctx.now() },
      })
    },
    { behavior: 'immediate' },
  )
}

function passOn(tx: Tx, ctx: Context, owned: LeavingGuide[], choices: Choice[]): void {
  const undecided = owned.filter(({ owners }) => owners.length === 0)
  const chosen = new Map(choices.map((choice) => [choice.guideId, choice]))
  const errors = undecided.flatMap((guide) => {
    const message = misfit(guide, chosen.get(guide.guideId))
    return message === undefined ? [] : [{ path: ['guides', guide.guideId], message }]
  })
  if (errors.length > 0) throw new Problem('bad-request', {}, errors)
  for (const guide of undecided) {
    const choice = chosen.get(guide.guideId)!
    if (choice.to === 'heir') makeOwner(tx, guide.guideId, choice.userId, ctx.now())
    if (choice.to === 'removed') deleteGuide(tx, guide.guideId)
  }
}

function misfit(guide: LeavingGuide, choice: Choice | undefined): string | undefined {
  if (choice === undefined) return 'Say who has this guide from now on.'
  if (choice.to === 'heir' && !guide.heirs.some(({ userId }) => userId === choice.userId)) {
    return 'Choose somebody who works on this guide.'
  }
  return choice.to === 'removed' && guide.published
    ? 'This guide is published and stays; say who has it from now on.'
    : undefined
}
