import { useEffect, useState, useSyncExternalStore } from 'react'
import { fetchDraft } from '../api/fetchDraft'
import { fetchFiles } from '../api/fetchFiles'
import { saveDraft, saveWhileClosing } from '../api/saveDraft'
import { sayHere } from '../api/sayHere'
import { sendFiles } from '../api/sendFiles'
import { settleConflict } from '../api/settleConflict'
import { DraftSession, type Outside, type SessionView } from './draftSession'
import { keptDrafts } from './keptDrafts'
import { newId } from './newId'

/**
 * Opens a guide's draft for as long as the page shows it, and saves it when the page goes. For another guide the caller must be another
 * component (by its key).
 */
export function useDraftState(
  personId: string,
  guideId: string,
): { session: DraftSession; view: SessionView } {
  const [session] = useState(() => new DraftSession(outsideOf(personId, guideId)))
  useEffect(() => {
    void session.open()
    const stop = listen(session)
    return () => {
      stop()
      session.close()
    }
  }, [session])
  const view = useSyncExternalStore(session.watch, session.look)
  return { session, view }
}

const outsideOf = (personId: string, guideId: string): Outside => ({
  fetchDraft: () => fetchDraft(guideId),
  saveDraft: (document, version) => saveDraft(guideId, document, version),
  saveWhileClosing: (document, version) => saveWhileClosing(guideId, document, version),
  sayHere: (step) => sayHere(guideId, step),
  settleConflict: (id, keep) => settleConflict(guideId, id, keep),
  sendFiles,
  fetchFiles,
  kept: keptDrafts(personId, guideId, newId()),
  now: Date.now,
})

/** The network comes back, the page is looked at again (perhaps after signing in elsewhere), or it closes. */
function listen(session: DraftSession): () => void {
  const retry = (): void => session.saveNow()
  const shown = (): void => {
    if (document.visibilityState === 'visible') session.saveNow()
    else session.closing()
  }
  const leave = (event: BeforeUnloadEvent): void => {
    if (session.closing()) event.preventDefault()
  }
  window.addEventListener('online', retry)
  window.addEventListener('focus', retry)
  window.addEventListener('beforeunload', leave)
  document.addEventListener('visibilitychange', shown)
  return () => {
    window.removeEventListener('online', retry)
    window.removeEventListener('focus', retry)
    window.removeEventListener('beforeunload', leave)
    document.removeEventListener('visibilitychange', shown)
  }
}
