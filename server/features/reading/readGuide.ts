import type { GuideData } from '../../../shared/api/pages'
import type { Context } from '../../context'
import { presentFile } from '../../files/presentFile'
import { readFiles } from '../../files/repo'
import { presentRevision } from '../../guides/presentRevision'
import { readDocument } from '../../guides/repo'
import { guideBySlug, revisionsOf } from './repo'

/** A published guide at its latest revision, or at the one with this label; undefined where there is none. Drafts never show here. */
export function readGuide(ctx: Context, slug: string, label?: string): GuideData | undefined {
  const guide = guideBySlug(ctx.db, slug)
  if (guide === undefined) return undefined
  const revisions = revisionsOf(ctx.db, guide.id)
  const revision =
    label === undefined ? revisions[0] : revisions.find((candidate) => candidate.label === label)
  if (revision === undefined) return undefined
  const document = readDocument(ctx.db, revision.documentHash)
  return {
    slug: guide.slug,
    byline: guide.byline,
    document,
    revision: presentRevision(guide, revision),
    revisions: revisions.map((each) => presentRevision(guide, each)),
    files: readFiles(
      ctx.db,
      document.assets.map(({ sha256 }) => sha256),
    ).map(presentFile),
    pinned: label !== undefined,
  }
}
