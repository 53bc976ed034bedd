import type { Router } from 'express'
import type { Context } from '../../../context'
import { ownImport } from '../ownImport'
import { deleteImport } from '../repo'

/** DELETE /api/imports/:importId: forgets it. A guide that was made of it stays. */
export function remove(router: Router, ctx: Context): void {
  router.delete('/imports/:importId', (req, res) => {
    const { row } = ownImport(ctx, req, req.params.importId)
    deleteImport(ctx.db, row.id)
    res.status(204).end()
  })
}
