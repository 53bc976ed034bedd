import type { Router } from 'express'
import { SaveDraft, type SavedDraft } from '../../../../shared/api/drafts'
import { permit } from '../../../auth/person'
import type { Context } from '../../../context'
import { saveDraft } from '../../../guides/saveDraft'
import { parseBody } from '../../../http/parse'
import { etagOf, versionFrom } from '../../../http/version'

/** PUT /api/guides/:guideId/draft with If-Match: saves, merging with what others saved since that version. */
export function save(router: Router, ctx: Context): void {
  router.put('/guides/:guideId/draft', (req, res) => {
    const permitted = permit(req, 'edit', req.params.guideId)
    const fromVersion = versionFrom(req)
    const { document } = parseBody(SaveDraft, req)
    const saved: SavedDraft = saveDraft(ctx, permitted, document, fromVersion)
    res.set('ETag', etagOf(saved.version)).json(saved)
  })
}
