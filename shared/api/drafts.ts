import { z } from 'zod'
import { GuideDocument } from '../guide/schema'
import { FileEntry } from './files'
import { GuideEntry } from './guides'

/** Two authors changed one field: both versions, until somebody settles it. The draft holds `theirs`, which was saved first. */
export const DraftConflict = z.object({
  id: z.string(),
  node: z.string().nullable(),
  field: z.string(),
  why: z.enum(['both changed', 'changed and removed', 'both moved', 'both reordered']),
  base: z.unknown(),
  mine: z.unknown(),
  theirs: z.unknown(),
  mineByName: z.string(),
  theirsByName: z.string(),
  createdAt: z.iso.datetime(),
})
export type DraftConflict = z.infer<typeof DraftConflict>

/** Somebody else who was in this draft within the last minute, and the step that was open. */
export const AlsoHere = z.object({ name: z.string(), step: z.string().nullable() })
export type AlsoHere = z.infer<typeof AlsoHere>

/** GET /api/guides/:guideId/draft. The ETag header is `"<version>"`; If-None-Match answers 304. */
export const Draft = z.object({
  guide: GuideEntry,
  document: GuideDocument,
  version: z.number().int(),
  conflicts: z.array(DraftConflict),
  files: z.array(FileEntry),
})
export type Draft = z.infer<typeof Draft>

/** PUT /api/guides/:guideId/draft with If-Match: `"<version>"` of the state that was changed. */
export const SaveDraft = z.object({ document: GuideDocument })
export type SaveDraft = z.infer<typeof SaveDraft>

/**
 * What was kept. With an older If-Match the save is merged with what others saved meanwhile: `document` is the result and differs
 * from what was sent, `conflicts` are the places that somebody must settle; what was sent for them is in `mine`, so nothing is lost.
 */
export const SavedDraft = z.object({
  version: z.number().int(),
  document: GuideDocument,
  merged: z.boolean(),
  conflicts: z.array(DraftConflict),
  savedAt: z.iso.datetime(),
})
export type SavedDraft = z.infer<typeof SavedDraft>

/** POST /api/guides/:guideId/draft/conflicts/:conflictId: settles it. `mine` puts the kept version into the draft. */
export const SettleConflict = z.object({ keep: z.enum(['mine', 'theirs']) })
export type SettleConflict = z.infer<typeof SettleConflict>

/** POST /api/guides/:guideId/draft/here {step}: says that one is there; answers with who else is. */
export const SayHere = z.object({ step: z.string().nullable() })
export const HereAnswer = z.object({ version: z.number().int(), also: z.array(AlsoHere) })
export type HereAnswer = z.infer<typeof HereAnswer>
