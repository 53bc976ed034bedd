import type { Conflict } from '../../shared/guide/merge'
import { valueAt } from '../../shared/guide/settle'
import { canonicalJson } from '../../shared/lib/json/hash'
import type { Tx } from '../db/open'
import { readDocument, readStatesAfter, type DraftStateRow } from './repo'

/** Looking further back costs reading a document for each state; beyond this the last save is named. */
const LOOKED_AT = 40

/** Who saved the other side of a conflict: the last one after the base in whose save the value at its place changed. */
export function whoChanged(tx: Tx, base: DraftStateRow, conflicts: readonly Conflict[]): (string | null)[] {
  const states = [...readStatesAfter(tx, base.guideId, base.version, LOOKED_AT), base]
  const values = states.map((state) => {
    const document = readDocument(tx, state.documentHash)
    return conflicts.map((conflict) => canonicalJson({ value: valueAt(document, conflict) ?? null }))
  })
  return conflicts.map((_, index) => {
    const at = values.findIndex(
      (value, place) => place + 1 < values.length && value[index] !== values[place + 1]![index],
    )
    return states[at === -1 ? 0 : at]!.savedBy
  })
}
