import { useSyncExternalStore } from 'react'

/** As in styles/parts.css: below this a page is for a phone. */
const PHONE = '(max-width: 703px)'

function watch(watcher: () => void): () => void {
  const query = window.matchMedia(PHONE)
  query.addEventListener('change', watcher)
  return () => query.removeEventListener('change', watcher)
}

/** Whether the page is as narrow as a phone's. */
export const useNarrow = (): boolean => useSyncExternalStore(watch, () => window.matchMedia(PHONE).matches)
