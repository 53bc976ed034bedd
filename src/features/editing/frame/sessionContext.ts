import { createContext, useContext } from 'react'
import type { Judged } from '../findings/judge'
import type { DraftSession, DraftView } from '../state/draftSession'

/** What the frame of the drafting page knows beside the document: for its own parts. */
export interface OpenDraft extends Judged {
  guideId: string
  session: DraftSession
  view: DraftView
  /** Says that something was done that undo brings back, with the button for it. */
  sayDone: (sentence: string) => void
}

export const OpenDraftContext = createContext<OpenDraft | null>(null)

/** The open draft. @throws outside of the drafting page: a programmer's error. */
export function useOpenDraft(): OpenDraft {
  const open = useContext(OpenDraftContext)
  if (open === null) throw new Error('useOpenDraft is used outside of the drafting page.')
  return open
}
