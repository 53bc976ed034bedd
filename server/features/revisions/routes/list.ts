import type { Router } from 'express'
import { z } from 'zod'
import type { RevisionPage } from '../../../../shared/api/revisions'
import { permit } from '../../../auth/person'
import type { Context } from '../../../context'
import { presentRevision } from '../../../guides/presentRevision'
import { readGuide } from '../../../guides/repo'
import { revisionsOf } from '../../../guides/revisionRepo'
import { parseQuery } from '../../../http/parse'
import { Problem } from '../../../http/problem'

const PAGE = 30
const Query = z.object({
  /** The number of the revision that ended the last page. */
  cursor: z.coerce.number({ error: 'Start at the first page again.' }).int().min(1).optional(),
})

/** GET /api/guides/:guideId/revisions, newest first. */
export function list(router: Router, ctx: Context): void {
  router.get('/guides/:guideId/revisions', (req, res) => {
    const { guideId } = permit(req, 'see', req.params.guideId)
    const { cursor } = parseQuery(Query, req)
    const guide = readGuide(ctx.db, guideId)
    if (guide === undefined) throw new Problem('not-found')
    const found = revisionsOf(ctx.db, guideId, PAGE + 1, cursor)
    const page = found.slice(0, PAGE)
    res.json({
      revisions: page.map((revision) => presentRevision(guide, revision)),
      next: found.length > PAGE ? String(page.at(-1)!.number) : null,
    } satisfies RevisionPage)
  })
}
