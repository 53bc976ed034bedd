import { createContext, useContext } from 'react'
import type { FileEntry } from '../../../shared/api/files'
import type { Choices } from '../../../shared/guide/holds'
import type { Numbering } from '../../../shared/guide/numbering'
import type { GuideDocument } from '../../../shared/guide/schema'
import type { Id } from '../../../shared/lib/ids/id'

/** A change is a pure function on the document. */
export type Change = (document: GuideDocument) => GuideDocument

/** What every part of the drafting page works on. */
export interface DraftAtHand {
  document: GuideDocument
  numbers: Numbering
  /** What is known of the document's files: sizes, renditions, measures, progress. */
  files: ReadonlyMap<string, FileEntry>
  choices: Choices
  /**
   * Applies a change, remembers it for undo and saves it in a moment. Changes with the same `together` key that follow each other
   * within two seconds are one step of undo (typing in one field).
   */
  edit: (change: Change, together?: string) => void
  newId: () => Id
  /** Sends files to the site; resolves when each is stored (pictures and models go on being worked on). Refused ones are shown. */
  bringFiles: (files: readonly File[]) => Promise<FileEntry[]>
  /** Says something to screen readers and shows it in the state line. */
  announce: (sentence: string) => void
  readOnly: boolean
}

export const DraftContext = createContext<DraftAtHand | null>(null)

/** The draft at hand. @throws outside of the drafting page: a programmer's error. */
export function useDraft(): DraftAtHand {
  const draft = useContext(DraftContext)
  if (draft === null) throw new Error('useDraft is used outside of the drafting page.')
  return draft
}
