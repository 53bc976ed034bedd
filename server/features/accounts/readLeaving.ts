import type { Leaving } from '../../../shared/api/accounts'
import { GuideDocument } from '../../../shared/guide/schema'
import type { Tx } from '../../db/open'
import { countPublishedBy, countRevisions, listGuidesOf, listOthers } from './repo'

/** What somebody who leaves must decide: their guides, who could take each, and whether revisions name them. */
export function readLeaving(tx: Tx, userId: string): Leaving {
  const guides = listGuidesOf(tx, userId, 'owner').map((guide) => {
    const others = listOthers(tx, guide.id, userId)
    const owners = others.filter(({ role }) => role === 'owner')
    const heirs = new Map(others.map(({ userId: id, name }) => [id, { userId: id, name }]))
    return {
      guideId: guide.id,
      title: GuideDocument.shape.title.parse((JSON.parse(guide.json) as { title: unknown }).title),
      published: countRevisions(tx, guide.id) > 0,
      owners: owners.map(({ name }) => name),
      heirs: owners.length > 0 ? [] : [...heirs.values()],
    }
  })
  return { guides, revisions: countPublishedBy(tx, userId) }
}
