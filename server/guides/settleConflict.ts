import { GuideDocument } from '../../shared/guide/schema'
import { settle } from '../../shared/guide/settle'
import type { Permitted } from '../auth/person'
import type { Context } from '../context'
import { Problem } from '../http/problem'
import { checkDocument } from './checkDocument'
import { markSettled, readOpenConflicts } from './conflictRepo'
import { readDocument, readDraft } from './repo'
import { putIfChanged } from './saveDraft'

/**
 * Settles a conflict: the kept version is put into the draft as it is now. @throws Problem not-found for one that is settled already;
 * stale where its place is gone or would no longer hold what was kept; it stays open then.
 */
export function settleConflict(
  ctx: Context,
  { guideId, person }: Permitted<'edit'>,
  conflictId: string,
  keep: 'mine' | 'theirs',
): void {
  ctx.db.transaction(
    (tx) => {
      const draft = readDraft(tx, guideId)
      const open = readOpenConflicts(tx, guideId).find(({ row }) => row.id === conflictId)
      if (draft === undefined || open === undefined) throw new Problem('not-found')
      const settled = settle(readDocument(tx, draft.documentHash), open.conflict, keep)
      const checked = GuideDocument.safeParse(settled)
      if (!checked.success) throw new Problem('stale', {}, [], { cause: checked.error })
      checkDocument(tx, checked.data)
      putIfChanged(tx, ctx, draft, checked.data, person.id)
      markSettled(tx, conflictId, ctx.now())
    },
    { behavior: 'immediate' },
  )
}
