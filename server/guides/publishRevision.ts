import type { PublishRevision } from '../../shared/api/revisions'
import { readiness } from '../../shared/guide/readiness'
import type { Permitted } from '../auth/person'
import type { Context } from '../context'
import type { Tx } from '../db/open'
import { Problem } from '../http/problem'
import { readOpenConflicts } from './conflictRepo'
import { fileFacts } from './fileFacts'
import {
  freeSlug,
  latestRevision,
  readDocument,
  readDraft,
  readGuide,
  setSlug,
  type DraftRow,
  type GuideRow,
  type RevisionRow,
} from './repo'
import { insertRevision, putSearch, takenLabel } from './revisionRepo'
import { slugOf } from './slugOf'

/**
 * The draft becomes the next revision: its row, what is found of it by search, its address on first publishing and the work that
 * follows come into being in one transaction, or none of them.
 * @throws Problem stale, label-taken, nothing-changed, conflicts-open, not-ready, or bad-request without a change class where one is due.
 */
export function publishRevision(
  ctx: Context,
  { guideId, person }: Permitted<'publish'>,
  ask: PublishRevision,
  fromVersion: number,
): { guide: GuideRow; revision: RevisionRow } {
  return ctx.db.transaction(
    (tx) => {
      const draft = readDraft(tx, guideId)
      if (draft === undefined) throw new Problem('not-found')
      if (draft.version !== fromVersion) throw new Problem('stale')
      const latest = latestRevision(tx, guideId)
      refuse(tx, draft, ask, latest)
      const document = readDocument(tx, draft.documentHash)
      const findings = readiness(document, fileFacts(tx, document)).filter(({ must }) => must)
      if (findings.length > 0) throw new Problem('not-ready', { count: findings.length })
      const revision: RevisionRow = {
        id: ctx.newId(),
        guideId,
        number: (latest?.number ?? 0) + 1,
        label: ask.label,
        documentHash: draft.documentHash,
        changeClass: latest === undefined ? null : ask.changeClass,
        note: ask.note,
        publishedByName: person.name,
        publishedBy: person.id,
        publishedAt: ctx.now(),
      }
      insertRevision(tx, revision)
      // Until now nobody outside knew the guide's address: it is taken from the title as it is published, and stays.
      if (latest === undefined) setSlug(tx, guideId, freeSlug(tx, slugOf(document.title), guideId))
      putSearch(tx, guideId, document)
      ctx.jobs.add(tx, 'revision-published', { revisionId: revision.id })
      return { guide: readGuide(tx, guideId)!, revision }
    },
    { behavior: 'immediate' },
  )
}

function refuse(tx: Tx, draft: DraftRow, ask: PublishRevision, latest: RevisionRow | undefined): void {
  const label = takenLabel(tx, draft.guideId, ask.label)
  if (label !== undefined) throw new Problem('label-taken', { label })
  if (latest?.documentHash === draft.documentHash)
    throw new Problem('nothing-changed', { label: latest.label })
  if (latest !== undefined && ask.changeClass === null) {
    const message = 'Say whether what was built before still fits: choose the class of this change.'
    throw new Problem('bad-request', {}, [{ path: ['changeClass'], message }])
  }
  const open = readOpenConflicts(tx, draft.guideId).length
  if (open > 0) throw new Problem('conflicts-open', { count: open })
}
