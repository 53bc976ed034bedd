import { z } from 'zod'
import { Understanding } from '../importing/understanding'

export * from '../importing/understanding'

/** POST /api/imports (multipart: `files`, `paths` = JSON array of a relative path for each file, `guideId` to add to a guide) → 202. */
export const ImportStarted = z.object({ id: z.string() })
export type ImportStarted = z.infer<typeof ImportStarted>

export const IMPORT_LIMITS = { files: 500, fileBytes: 300 * 1024 * 1024 } as const

/** GET /api/imports/:id. `trouble` is a sentence where it failed. `progress.now` names the file in hand. */
export const ImportEntry = z.object({
  id: z.string(),
  state: z.enum(['reading', 'understood', 'taken', 'failed']),
  progress: z.object({ done: z.number().int(), total: z.number().int(), now: z.string() }),
  trouble: z.string().nullable(),
  guideId: z.string().nullable(),
  understanding: Understanding.nullable(),
})
export type ImportEntry = z.infer<typeof ImportEntry>

/**
 * PUT /api/imports/:id, answered by an ImportEntry. Where a table's headingRow, columns or include differ from the stored ones, its
 * lines are read anew and what was edited in them is replaced.
 */
export const ImportChange = z.object({ understanding: Understanding })
export type ImportChange = z.infer<typeof ImportChange>

/** POST /api/imports/:id/take: the guide that was made or added to. */
export const ImportTaken = z.object({ guideId: z.string() })
export type ImportTaken = z.infer<typeof ImportTaken>
