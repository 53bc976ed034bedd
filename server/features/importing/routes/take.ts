import type { Router } from 'express'
import type { ImportTaken } from '../../../../shared/api/imports'
import { permit, permitOnSite } from '../../../auth/person'
import type { Context } from '../../../context'
import { ownImport } from '../ownImport'
import { takeImport } from '../takeImport'

/** POST /api/imports/:importId/take: the guide that it made or was added to. */
export function take(router: Router, ctx: Context): void {
  router.post('/imports/:importId/take', (req, res) => {
    const { person, row } = ownImport(ctx, req, req.params.importId)
    const adds = row.guideId !== null && row.state !== 'taken'
    const permitted = adds ? permit(req, 'edit', row.guideId!) : null
    if (!adds) permitOnSite(req, 'start')
    res.json({ guideId: takeImport(ctx, person, row, permitted) } satisfies ImportTaken)
  })
}
