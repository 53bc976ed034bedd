import type { Router } from 'express'
import type { Draft } from '../../../../shared/api/drafts'
import { permit } from '../../../auth/person'
import type { Context } from '../../../context'
import { presentFile } from '../../../files/presentFile'
import { readFiles } from '../../../files/repo'
import { readOpenConflicts } from '../../../guides/conflictRepo'
import { fileReferences } from '../../../guides/fileReferences'
import { presentConflict } from '../../../guides/presentConflict'
import { presentGuide } from '../../../guides/presentGuide'
import { readDocument, readDraft, readGuideEntry, rolesOn } from '../../../guides/repo'
import { Problem } from '../../../http/problem'
import { etagOf } from '../../../http/version'

/** GET /api/guides/:guideId/draft: the draft with its conflicts and what is known of its files. */
export function read(router: Router, ctx: Context): void {
  router.get('/guides/:guideId/draft', (req, res) => {
    const { guideId, person } = permit(req, 'see', req.params.guideId)
    const answer = ctx.db.transaction((tx): Draft => {
      const entry = readGuideEntry(tx, guideId)
      const draft = readDraft(tx, guideId)
      if (entry === undefined || draft === undefined) throw new Problem('not-found')
      const document = readDocument(tx, draft.documentHash)
      const hashes = fileReferences(document).map(({ sha256 }) => sha256)
      return {
        guide: presentGuide(entry, rolesOn(tx, guideId, person.id)),
        document,
        version: draft.version,
        conflicts: readOpenConflicts(tx, guideId).map(presentConflict),
        files: readFiles(tx, hashes).map(presentFile),
      }
    })
    // Express answers 304 where If-None-Match has this version.
    res.set('ETag', etagOf(answer.version)).json(answer)
  })
}
