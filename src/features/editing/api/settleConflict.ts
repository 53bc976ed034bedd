import { z } from 'zod'
import type { SettleConflict } from '../../../../shared/api/drafts'
import { request } from '../../../lib/request'

/** Settles a conflict; the draft is fetched anew after it. */
export const settleConflict = (
  guideId: string,
  conflictId: string,
  keep: SettleConflict['keep'],
): Promise<unknown> =>
  request(`/api/guides/${guideId}/draft/conflicts/${conflictId}`, z.unknown(), {
    method: 'POST',
    body: { keep },
  })
