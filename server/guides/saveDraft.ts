import type { SavedDraft } from '../../shared/api/drafts'
import type { GuideDocument } from '../../shared/guide/schema'
import { hashOf } from '../../shared/lib/json/hash'
import type { Permitted } from '../auth/person'
import type { Context } from '../context'
import type { Tx } from '../db/open'
import { Problem } from '../http/problem'
import { checkDocument } from './checkDocument'
import { combine } from './combine'
import { readOpenConflicts } from './conflictRepo'
import { keepConflicts } from './keepConflicts'
import { presentConflict } from './presentConflict'
import { insertDocument, putDraft, readDocument, readDraft, readDraftState, type DraftRow } from './repo'
import { thinLater } from './thinDraft'
import { whoChanged } from './whoChanged'

/**
 * Saves a document that was changed from `fromVersion` of the draft. A late one is merged with what others saved since. All in one
 * transaction, which holds back other writers from its start, so that two saves at once come one after the other.
 * @throws Problem bad-request for a document that cannot be kept; stale for a version that the draft never had.
 */
export function saveDraft(
  ctx: Context,
  { guideId, person }: Permitted<'edit'>,
  document: GuideDocument,
  fromVersion: number,
): SavedDraft {
  return ctx.db.transaction(
    (tx) => {
      checkDocument(tx, document)
      const draft = readDraft(tx, guideId)
      if (draft === undefined) throw new Problem('not-found')
      if (fromVersion > draft.version) throw new Problem('stale')
      const result =
        fromVersion === draft.version
          ? document
          : combineLate(tx, ctx, draft, document, fromVersion, person.id)
      const saved = putIfChanged(tx, ctx, draft, result, person.id)
      return {
        version: saved.version,
        document: result,
        merged: hashOf(document) !== saved.documentHash,
        conflicts: readOpenConflicts(tx, guideId).map(presentConflict),
        savedAt: saved.updatedAt.toISOString(),
      }
    },
    { behavior: 'immediate' },
  )
}

function combineLate(
  tx: Tx,
  ctx: Context,
  draft: DraftRow,
  mine: GuideDocument,
  fromVersion: number,
  mineBy: string,
): GuideDocument {
  const base = readDraftState(tx, draft.guideId, fromVersion)
  if (base === undefined) throw new Problem('stale')
  const { document, conflicts } = combine(
    readDocument(tx, base.documentHash),
    mine,
    readDocument(tx, draft.documentHash),
  )
  if (conflicts.length > 0) {
    const others = whoChanged(tx, base, conflicts)
    keepConflicts(
      tx,
      ctx,
      draft.guideId,
      conflicts.map((conflict, at) => ({ conflict, mineBy, theirsBy: others[at] ?? null })),
    )
  }
  return document
}

/** A save that changes nothing makes no new version. @returns the draft as it is now. */
export function putIfChanged(
  tx: Tx,
  ctx: Context,
  draft: DraftRow,
  document: GuideDocument,
  by: string,
): DraftRow {
  if (hashOf(document) === draft.documentHash) return draft
  const now = ctx.now()
  const next: DraftRow = {
    guideId: draft.guideId,
    documentHash: insertDocument(tx, document, now),
    version: draft.version + 1,
    updatedBy: by,
    updatedAt: now,
  }
  putDraft(tx, next)
  thinLater(tx, ctx, draft.guideId)
  return next
}
