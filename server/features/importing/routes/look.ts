import type { Router } from 'express'
import type { Context } from '../../../context'
import { ownImport } from '../ownImport'
import { presentImport } from '../presentImport'

/** GET /api/imports/:importId: how far it is, then what was understood. */
export function look(router: Router, ctx: Context): void {
  router.get('/imports/:importId', (req, res) => {
    res.json(presentImport(ownImport(ctx, req, req.params.importId).row))
  })
}
