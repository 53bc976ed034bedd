import type { GuideDocument } from '../../shared/guide/schema'
import type { SignedIn } from '../auth/repo'
import type { Context } from '../context'
import type { Tx } from '../db/open'
import { checkDocument } from './checkDocument'
import { freeSlug, insertDocument, insertGuide, putDraft } from './repo'
import { slugOf } from './slugOf'

/** Makes a guide with this document as its draft, owned by the person, inside the caller's transaction. @returns its id. */
export function startGuide(
  tx: Tx,
  ctx: Context,
  owner: Pick<SignedIn, 'id' | 'name'>,
  document: GuideDocument,
): string {
  checkDocument(tx, document)
  const now = ctx.now()
  const guideId = ctx.newId()
  const slug = freeSlug(tx, slugOf(document.title))
  insertGuide(tx, { id: guideId, slug, byline: owner.name, createdAt: now }, owner.id)
  const documentHash = insertDocument(tx, document, now)
  putDraft(tx, { guideId, documentHash, version: 1, updatedBy: owner.id, updatedAt: now })
  return guideId
}
