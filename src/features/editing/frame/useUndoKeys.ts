import { useEffect } from 'react'
import type { DraftSession } from '../state/draftSession'

/**
 * Undo and redo by keyboard anywhere on the page, in text fields and the text editor too: the document has one history, so the
 * browser's own per field must not answer. Fields that are not the document's (`data-own-undo`) keep theirs.
 */
export function useUndoKeys(session: DraftSession, done: (what: 'undone' | 'redone') => void): void {
  useEffect(() => {
    const go = (event: Event, what: 'undone' | 'redone'): void => {
      if (event.target instanceof Element && event.target.closest('[data-own-undo]') !== null) return
      event.preventDefault()
      event.stopPropagation()
      if (what === 'undone' ? session.undo() : session.redo()) done(what)
    }
    const onKey = (event: KeyboardEvent): void => {
      if (!(event.ctrlKey || event.metaKey) || event.altKey) return
      const key = event.key.toLowerCase()
      if (key === 'z') go(event, event.shiftKey ? 'redone' : 'undone')
      else if (key === 'y' && !event.shiftKey) go(event, 'redone')
    }
    // From a phone's keyboard or the browser's menu it comes as an input event.
    const onInput = (event: InputEvent): void => {
      if (event.inputType === 'historyUndo') go(event, 'undone')
      else if (event.inputType === 'historyRedo') go(event, 'redone')
    }
    window.addEventListener('keydown', onKey, { capture: true })
    window.addEventListener('beforeinput', onInput, { capture: true })
    return () => {
      window.removeEventListener('keydown', onKey, { capture: true })
      window.removeEventListener('beforeinput', onInput, { capture: true })
    }
  }, [session, done])
}
