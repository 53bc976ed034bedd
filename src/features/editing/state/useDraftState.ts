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

const LOADING: SessionView = { is: 'loading' }
const nothing = (): (() => void) => () => undefined

/** Opens a guide's draft for as long as the page shows it, and saves it when the page goes. */
export function useDraftState(guideId: string): { session: DraftSession | null; view: SessionView } {
  const [session, setSession] = useState<DraftSession | null>(null)
  useEffect(() => {
    const opened = new DraftSession(outsideOf(guideId))
    setSession(opened)
    void opened.open()
    const stop = listen(opened)
    return () => {
      stop()
      opened.close()
      setSession(null)
    }
  }, [guideId])
  const view = useSyncExternalStore(session?.watch ?? nothing, session?.look ?? (() => LOADING))
  return { session, view }
}

const outsideOf = (guideId: string): Outside => ({
  fetchDraft: () => fetchDraft(guideId),
  saveDraft: (document, version) => saveDraft(guideId, document, version),
  saveWhileClosing: (document, version) => saveWhileClosing(guideId, document, version),
  sayHere: (step) => sayHere(guideId, step),
  settleConflict: (id, keep) => settleConflict(guideId, id, keep),
  sendFiles,
  fetchFiles,
  kept: keptDrafts(guideId, newId()),
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
