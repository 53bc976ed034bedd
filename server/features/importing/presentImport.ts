import { z } from 'zod'
import type { ImportEntry } from '../../../shared/api/imports'
import type { Understanding } from '../../../shared/importing/understanding'
import type { ImportRow } from './repo'

const Progress = z.object({ progress: z.object({ done: z.number(), total: z.number(), now: z.string() }) })
const NONE = { done: 0, total: 0, now: '' }

/** While it is read, the row holds how far that is; afterwards what was understood. */
export function presentImport(row: ImportRow): ImportEntry {
  const reading = row.state === 'reading' || row.state === 'failed'
  const progress = reading ? Progress.safeParse(JSON.parse(row.understanding)) : undefined
  return {
    id: row.id,
    state: row.state,
    progress: progress?.success === true ? progress.data.progress : NONE,
    trouble: row.trouble,
    guideId: row.guideId,
    understanding: reading ? null : storedUnderstanding(row),
  }
}

/** What is stored was checked when it came in. */
export const storedUnderstanding = (row: ImportRow): Understanding =>
  JSON.parse(row.understanding) as Understanding
