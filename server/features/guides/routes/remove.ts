import type { Router } from 'express'
import { permit } from '../../../auth/person'
import type { Context } from '../../../context'
import { deleteGuide, latestRevision } from '../../../guides/repo'
import { Problem } from '../../../http/problem'

/** DELETE /api/guides/:guideId: a guide that was never published is removed with its draft and all history. */
export function remove(router: Router, ctx: Context): void {
  router.delete('/guides/:guideId', (req, res) => {
    const { guideId } = permit(req, 'manage', req.params.guideId)
    ctx.db.transaction(
      (tx) => {
        if (latestRevision(tx, guideId) !== undefined) throw new Problem('is-published')
        deleteGuide(tx, guideId)
      },
      { behavior: 'immediate' },
    )
    res.status(204).end()
  })
}
