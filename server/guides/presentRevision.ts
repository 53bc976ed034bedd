import type { RevisionEntry } from '../../shared/api/revisions'
import type { GuideRow, RevisionRow } from './repo'

export const presentRevision = (guide: GuideRow, revision: RevisionRow): RevisionEntry => ({
  id: revision.id,
  number: revision.number,
  label: revision.label,
  note: revision.note,
  changeClass: revision.changeClass,
  documentHash: revision.documentHash,
  publishedByName: revision.publishedByName,
  publishedAt: revision.publishedAt.toISOString(),
  address: `/guides/${encodeURIComponent(guide.slug)}/revisions/${encodeURIComponent(revision.label)}`,
})
