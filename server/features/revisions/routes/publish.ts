import type { Router } from 'express'
import { PublishRevision, type RevisionEntry } from '../../../../shared/api/revisions'
import { permit } from '../../../auth/person'
import type { Context } from '../../../context'
import { presentRevision } from '../../../guides/presentRevision'
import { publishRevision } from '../../../guides/publishRevision'
import { parseBody } from '../../../http/parse'
import { versionFrom } from '../../../http/version'

/** POST /api/guides/:guideId/revisions with If-Match: the draft becomes the next revision. */
export function publish(router: Router, ctx: Context): void {
  router.post('/guides/:guideId/revisions', (req, res) => {
    const permitted = permit(req, 'publish', req.params.guideId)
    const fromVersion = versionFrom(req)
    const ask = parseBody(PublishRevision, req)
    const { guide, revision } = publishRevision(ctx, permitted, ask, fromVersion)
    const entry: RevisionEntry = presentRevision(guide, revision)
    res.status(201).location(entry.address).json(entry)
  })
}
