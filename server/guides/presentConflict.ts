import { FORMER_MEMBER } from '../../shared/access/formerMember'
import type { DraftConflict } from '../../shared/api/drafts'
import type { OpenConflict } from './conflictRepo'

/** A side that does not have the node or the field at all is null. */
export const presentConflict = (open: OpenConflict): DraftConflict => ({
  id: open.row.id,
  node: open.conflict.node,
  field: open.conflict.field,
  why: open.conflict.why,
  base: open.conflict.base ?? null,
  mine: open.conflict.mine ?? null,
  theirs: open.conflict.theirs ?? null,
  mineByName: open.mineByName ?? FORMER_MEMBER,
  theirsByName: open.theirsByName ?? FORMER_MEMBER,
  createdAt: open.row.createdAt.toISOString(),
})
