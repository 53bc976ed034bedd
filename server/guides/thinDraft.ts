import type { Context } from '../context'
import type { Tx } from '../db/open'
import { readDraft, thinDraftStates } from './repo'

const ALL_STATES_MS = 24 * 3600_000
const THIN_AFTER_MS = 25 * 3600_000

/** A draft is saved every few seconds: after a day one state an hour is history enough. */
export function thinDraft(ctx: Context, guideId: string): void {
  const before = new Date(ctx.now().getTime() - ALL_STATES_MS)
  ctx.db.transaction(
    (tx) => {
      thinDraftStates(tx, guideId, before)
      const draft = readDraft(tx, guideId)
      if (draft !== undefined && draft.updatedAt > before) thinLater(tx, ctx, guideId)
    },
    { behavior: 'immediate' },
  )
}

/** One job a guide at a time: saves while it waits need none of their own. */
export function thinLater(tx: Tx, ctx: Context, guideId: string): void {
  ctx.jobs.add(
    tx,
    'thin-draft',
    { guideId },
    { key: `thin-draft ${guideId}`, delayMs: THIN_AFTER_MS, rank: 9 },
  )
}
