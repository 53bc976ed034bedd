import type { Router } from 'express'
import { GuideEntry, StartGuide } from '../../../../shared/api/guides'
import { emptyDocument } from '../../../../shared/guide/emptyDocument'
import { permitOnSite } from '../../../auth/person'
import type { Context } from '../../../context'
import { presentGuide } from '../../../guides/presentGuide'
import { readGuideEntry } from '../../../guides/repo'
import { startGuide } from '../../../guides/startGuide'
import { parseBody } from '../../../http/parse'

/** POST /api/guides: a new guide with an empty draft, owned by who asks. */
export function start(router: Router, ctx: Context): void {
  router.post('/guides', (req, res) => {
    const person = permitOnSite(req, 'start')
    const ask = parseBody(StartGuide, req)
    const entry = ctx.db.transaction((tx) => {
      const guideId = startGuide(tx, ctx, person, emptyDocument(ctx.newId, ask))
      return readGuideEntry(tx, guideId)!
    })
    res
      .status(201)
      .location(`/api/guides/${entry.guide.id}`)
      .json(presentGuide(entry, ['owner']) satisfies GuideEntry)
  })
}
