import { merge, type Conflict } from '../../shared/guide/merge'
import { repeatedId } from '../../shared/guide/repeatedId'
import { GuideDocument } from '../../shared/guide/schema'

/**
 * A late save and what others saved meanwhile, as one document. What both changed stays as it was saved first; the conflict holds
 * both. Two changes that are right each by itself can make something that the schema refuses (each side added so many options to
 * a line that together they are too many): then the draft stays as it is, and the late document as a whole is the conflict.
 */
export function combine(
  base: GuideDocument,
  mine: GuideDocument,
  theirs: GuideDocument,
): { document: GuideDocument; conflicts: Conflict[] } {
  const merged = merge(base, mine, theirs)
  const checked = GuideDocument.safeParse(merged.document)
  if (checked.success && repeatedId(checked.data) === undefined) return merged
  return { document: theirs, conflicts: [{ node: null, field: '', why: 'both changed', base, mine, theirs }] }
}
