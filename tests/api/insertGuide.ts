import { newId } from '../../server/context'
import {
  documents,
  drafts,
  draftStates,
  guideMembers,
  guides,
  revisions,
  users,
} from '../../server/db/schema'
import { emptyDocument } from '../../shared/guide/emptyDocument'
import type { TestSite } from './testSite'

export interface GuideOptions {
  published?: boolean
  byline?: string
}

/** A guide "Guide <id>" with an empty draft, straight into the tables, so that tests of people need no editor. */
export function insertGuide(site: TestSite, id: string, ownerId: string, options: GuideOptions = {}): void {
  const { db } = site.ctx
  const now = site.ctx.now()
  const document = emptyDocument(newId, { title: `Guide ${id}`, lang: 'en' })
  const documentHash = `hash-${id}`
  db.insert(documents)
    .values({ hash: documentHash, json: JSON.stringify(document), createdAt: now })
    .run()
  db.insert(guides)
    .values({ id, slug: id, byline: options.byline ?? 'A workshop', createdAt: now })
    .run()
  db.insert(drafts)
    .values({ guideId: id, documentHash, version: 1, updatedBy: ownerId, updatedAt: now })
    .run()
  db.insert(draftStates)
    .values({ guideId: id, version: 1, documentHash, savedBy: ownerId, savedAt: now })
    .run()
  db.insert(guideMembers).values({ guideId: id, userId: ownerId, role: 'owner', createdAt: now }).run()
  if (options.published !== true) return
  const owner = db
    .select()
    .from(users)
    .all()
    .find((user) => user.id === ownerId)
  db.insert(revisions)
    .values({
      id: `revision-${id}`,
      guideId: id,
      number: 1,
      label: 'A',
      documentHash,
      note: 'First',
      publishedByName: owner?.name ?? '',
      publishedBy: ownerId,
      publishedAt: now,
    })
    .run()
}
