import type { Router } from 'express'
import { SettleConflict } from '../../../../shared/api/drafts'
import { permit } from '../../../auth/person'
import type { Context } from '../../../context'
import { settleConflict } from '../../../guides/settleConflict'
import { parseBody } from '../../../http/parse'

/** POST /api/guides/:guideId/draft/conflicts/:conflictId: settles a conflict. The draft is fetched anew after it. */
export function settle(router: Router, ctx: Context): void {
  router.post('/guides/:guideId/draft/conflicts/:conflictId', (req, res) => {
    const permitted = permit(req, 'edit', req.params.guideId)
    const { keep } = parseBody(SettleConflict, req)
    settleConflict(ctx, permitted, req.params.conflictId, keep)
    res.status(204).end()
  })
}
