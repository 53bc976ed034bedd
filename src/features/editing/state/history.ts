import { merge } from '../../../../shared/guide/merge'
import type { GuideDocument } from '../../../../shared/guide/schema'

/** One step of undo: the whole document before and after. Documents share what is unchanged, so a step costs little. */
interface Deed {
  before: GuideDocument
  after: GuideDocument
  /** Deeds with the same key that follow each other closely are one. */
  together: string | undefined
  at: number
}

export interface History {
  past: readonly Deed[]
  future: readonly Deed[]
}

export const NO_HISTORY: History = { past: [], future: [] }

/** Typing in one field goes on being one step for so long after the last key. */
const TOGETHER_WITHIN_MS = 2000
const LONGEST = 300

/**
 * Remembers a deed. It grows the last one when both have the same key, little time has passed and nobody else's change came in
 * between (else undoing it would take that back too). Every deed ends what could be redone.
 */
export function remember(
  history: History,
  before: GuideDocument,
  after: GuideDocument,
  at: number,
  together?: string,
): History {
  if (before === after) return history
  const last = history.past.at(-1)
  const grows =
    last !== undefined &&
    together !== undefined &&
    last.together === together &&
    at - last.at <= TOGETHER_WITHIN_MS &&
    last.after === before
  const deed: Deed = { before: grows ? last.before : before, after, together, at }
  return { past: [...history.past.slice(0, grows ? -1 : undefined), deed].slice(-LONGEST), future: [] }
}

/**
 * Takes the last deed back, and only it: what others changed since stays. Gives exactly the document before where nothing came in
 * between. @returns undefined where there is nothing to undo.
 */
export function undo(
  history: History,
  now: GuideDocument,
): { history: History; document: GuideDocument } | undefined {
  const deed = history.past.at(-1)
  if (deed === undefined) return undefined
  const { document } = merge(deed.after, deed.before, now)
  const undone: Deed = { ...deed, before: now, after: document, together: undefined }
  return {
    document,
    history: { past: history.past.slice(0, -1), future: [...history.future, undone] },
  }
}

/** Does again what was undone last: undoing the undoing. */
export function redo(
  history: History,
  now: GuideDocument,
): { history: History; document: GuideDocument } | undefined {
  const deed = history.future.at(-1)
  if (deed === undefined) return undefined
  const { document } = merge(deed.after, deed.before, now)
  const redone: Deed = { ...deed, before: now, after: document, together: undefined }
  return {
    document,
    history: { past: [...history.past, redone], future: history.future.slice(0, -1) },
  }
}
