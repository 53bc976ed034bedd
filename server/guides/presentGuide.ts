import type { GuideRole } from '../../shared/access/ability'
import type { GuideEntry } from '../../shared/api/guides'
import type { GuideEntryRow } from './repo'

export const presentGuide = (row: GuideEntryRow, roles: GuideRole[]): GuideEntry => ({
  id: row.guide.id,
  slug: row.guide.slug,
  title: row.title,
  byline: row.guide.byline,
  roles,
  version: row.version,
  updatedAt: row.updatedAt.toISOString(),
  updatedByName: row.updatedByName,
  latest:
    row.latest === null
      ? null
      : { label: row.latest.label, publishedAt: row.latest.publishedAt.toISOString() },
})
