import type { Context } from '../context'
import { readFiles, type FileRow } from '../files/repo'
import { fileReferences } from './fileReferences'
import { readDocument } from './repo'
import { readRevision } from './revisionRepo'
import { thinDraft } from './thinDraft'

/** What follows from saving and publishing, after the answer. */
export function handleGuideJobs(ctx: Context): void {
  ctx.jobs.handle<{ guideId: string }>('thin-draft', ({ guideId }) =>
    Promise.resolve(thinDraft(ctx, guideId)),
  )
  ctx.jobs.handle<{ revisionId: string }>('revision-published', ({ revisionId }) =>
    completeFiles(ctx, revisionId),
  )
}

/** From now on everybody asks for the revision's files: whatever was made of them and is gone is made again. */
async function completeFiles(ctx: Context, revisionId: string): Promise<void> {
  const revision = readRevision(ctx.db, revisionId)
  if (revision === undefined) return
  const references = fileReferences(readDocument(ctx.db, revision.documentHash))
  const files = readFiles(
    ctx.db,
    references.map(({ sha256 }) => sha256),
  )
  const incomplete: FileRow['asset'][] = []
  for (const file of files) if (!(await isComplete(ctx, file))) incomplete.push(file.asset)
  ctx.db.transaction((tx) => {
    for (const { kind, sha256 } of incomplete) {
      ctx.jobs.add(tx, kind, { sha256 }, { key: `${kind} ${sha256}`, rank: 1 })
    }
  })
}

async function isComplete(ctx: Context, { asset, renditions }: FileRow): Promise<boolean> {
  if (asset.state !== 'ready' || renditions.length === 0) return false
  for (const { file } of renditions) if (!(await ctx.storage.has(file))) return false
  return true
}
