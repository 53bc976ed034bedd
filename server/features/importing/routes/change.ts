import type { Router } from 'express'
import { ImportChange } from '../../../../shared/api/imports'
import { readTablesAnew } from '../../../../shared/importing/readTablesAnew'
import type { Context } from '../../../context'
import { parseBody } from '../../../http/parse'
import { Problem } from '../../../http/problem'
import { ownImport } from '../ownImport'
import { presentImport, storedUnderstanding } from '../presentImport'
import { readImport, setImport } from '../repo'

/** PUT /api/imports/:importId: keeps what was corrected; a table whose columns changed is read anew. */
export function change(router: Router, ctx: Context): void {
  router.put('/imports/:importId', (req, res) => {
    const { row } = ownImport(ctx, req, req.params.importId)
    const { understanding } = parseBody(ImportChange, req)
    if (row.state !== 'understood') {
      throw new Problem('bad-request', {}, [
        { path: ['state'], message: 'This cannot be changed any more, or not yet.' },
      ])
    }
    const next = readTablesAnew(storedUnderstanding(row), understanding)
    setImport(ctx.db, row.id, { understanding: JSON.stringify(next), updatedAt: ctx.now() })
    res.json(presentImport(readImport(ctx.db, row.id)!))
  })
}
