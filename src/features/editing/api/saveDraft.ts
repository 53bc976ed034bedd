import { SavedDraft } from '../../../../shared/api/drafts'
import type { GuideDocument } from '../../../../shared/guide/schema'
import { request } from '../../../lib/request'

const address = (guideId: string): string => `/api/guides/${guideId}/draft`
const ifMatch = (version: number): Record<string, string> => ({ 'if-match': `"${version}"` })

/** Sends the document as changed from this version; the site merges it where others have saved since. */
export const saveDraft = (guideId: string, document: GuideDocument, version: number): Promise<SavedDraft> =>
  request(address(guideId), SavedDraft, { method: 'PUT', body: { document }, headers: ifMatch(version) })

/** Browsers let a closing page send no more than 64 KiB, headers and other requests of the page included. */
const LAST_WORD_BYTES = 60_000

/**
 * Sends it from a page that is closing; nobody will read the answer.
 * @returns false where it is too large for that.
 */
export function saveWhileClosing(guideId: string, document: GuideDocument, version: number): boolean {
  const body = JSON.stringify({ document })
  if (new Blob([body]).size > LAST_WORD_BYTES) return false
  const sending = fetch(address(guideId), {
    method: 'PUT',
    credentials: 'same-origin',
    keepalive: true,
    headers: { 'content-type': 'application/json', ...ifMatch(version) },
    body,
  })
  // The page is gone before an answer comes. What is kept on this device covers the case that it does not arrive.
  sending.catch((error: unknown) => {
    if (!(error instanceof TypeError)) throw error
  })
  return true
}
