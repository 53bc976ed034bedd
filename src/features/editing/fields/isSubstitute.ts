import type { Choices } from '../../../../shared/guide/holds'
import type { Condition, GuideDocument } from '../../../../shared/guide/schema'
import type { Id } from '../../../../shared/lib/ids/id'

/**
 * Whether a line is filled by another than the designer's part here: by the choices made, or because what it stands in is there only
 * with that other part. Such a line's balloon has a second ring.
 */
export function isSubstitute(
  { lines }: GuideDocument,
  lineId: Id,
  choices: Choices,
  when: Condition | undefined,
): boolean {
  const designers = lines.find(({ id }) => id === lineId)?.options[0]?.id
  if (designers === undefined) return false
  const clause = when?.find(({ line }) => line === lineId)
  if (clause !== undefined) return !clause.is.includes(designers)
  return (choices[lineId] ?? designers) !== designers
}
