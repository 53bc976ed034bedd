import type { Router } from 'express'
import { z } from 'zod'
import type { GuidePage } from '../../../../shared/api/guides'
import { signedIn } from '../../../auth/person'
import type { Context } from '../../../context'
import { presentGuide } from '../../../guides/presentGuide'
import { guideEntriesOf, rolesOn } from '../../../guides/repo'
import { cursorFrom, cursorOf } from '../../../http/cursor'
import { parseQuery } from '../../../http/parse'

const PAGE = 30
const Query = z.object({ cursor: z.string().max(300).optional() })

/** GET /api/guides: the drafts that the person works on, the last changed first. */
export function list(router: Router, ctx: Context): void {
  router.get('/guides', (req, res) => {
    const person = signedIn(req)
    const { cursor } = parseQuery(Query, req)
    const after = cursor === undefined ? null : cursorFrom(cursor)
    const found = guideEntriesOf(ctx.db, person.id, PAGE + 1, after)
    const page = found.slice(0, PAGE)
    const last = page.at(-1)
    res.json({
      guides: page.map((row) => presentGuide(row, rolesOn(ctx.db, row.guide.id, person.id))),
      next:
        found.length > PAGE && last !== undefined
          ? cursorOf({ at: last.updatedAt, id: last.guide.id })
          : null,
    } satisfies GuidePage)
  })
}
