import { merge } from '../../../../shared/guide/merge'
import type { GuideDocument } from '../../../../shared/guide/schema'
import { hashOf } from '../../../../shared/lib/json/hash'

/**
 * How the document in the browser stands to the one on the site. Pure: what is sent, and when, is decided elsewhere.
 *
 * `base` and `version` go together: the state that the next save is said to be made from (If-Match), and the ancestor by which the
 * site merges it. `site` is the newest state of the site that is known; usually the same.
 */
export interface Saving {
  document: GuideDocument
  base: GuideDocument
  version: number
  site: GuideDocument
  siteVersion: number
  /** What is on its way to the site. */
  sending: GuideDocument | null
  /** What was sent and never answered: the site may have it or not. The next look at the site tells. */
  lost: GuideDocument | null
}

/** The part of an answer that matters here: contracts SavedDraft and Draft both have it. */
interface SiteState {
  version: number
  document: GuideDocument
}

export const startSaving = ({ document, version }: SiteState): Saving => ({
  document,
  base: document,
  version,
  site: document,
  siteVersion: version,
  sending: null,
  lost: null,
})

/** There is something that the site does not have, as far as is known. */
export const isUnsent = (saving: Saving): boolean => saving.document !== saving.site

/** May a save be sent now? One at a time, and not before it is known what became of one that was lost. */
export const maySend = (saving: Saving): boolean =>
  saving.sending === null && saving.lost === null && isUnsent(saving)

export const changed = (saving: Saving, document: GuideDocument): Saving => ({ ...saving, document })

export const sent = (saving: Saving): Saving => ({ ...saving, sending: saving.document })

/**
 * The site has kept what was sent. What was changed here meanwhile is put on top of its answer. Where that and somebody else's
 * change meet in one field, the next save still says that it was made from the older version, so that the site sees the two meet
 * and keeps both; otherwise the other's would be written over without a trace.
 */
export function answered(saving: Saving, answer: SiteState & { merged: boolean }): Saving {
  const was = saving.sending ?? saving.document
  return landed({ ...saving, sending: null }, was, answer.merged ? answer.document : was, answer.version)
}

function landed(saving: Saving, was: GuideDocument, site: GuideDocument, version: number): Saving {
  const { document, conflicts } = merge(was, saving.document, site, 'mine')
  const next = { ...saving, document, site, siteVersion: version, lost: null }
  return conflicts.length === 0 ? { ...next, base: site, version } : next
}

/** There was no answer. The request may have arrived all the same. */
export const unanswered = (saving: Saving): Saving => ({
  ...saving,
  sending: null,
  lost: saving.sending ?? saving.lost,
})

/** The site refused: it certainly does not have it. */
export const refused = (saving: Saving): Saving => ({ ...saving, sending: null })

/**
 * The site was looked at. A save under way is waited for. After a lost save this tells what became of it. Unsent changes stay as
 * they are: the site merges them when they are sent, and keeps both where two meet.
 */
export function looked(saving: Saving, found: SiteState): Saving {
  if (saving.sending !== null || found.version < saving.siteVersion) return saving
  if (saving.lost !== null) return lookedForLost(saving, saving.lost, found)
  if (found.version === saving.siteVersion) return saving
  if (isUnsent(saving)) return saving
  const { document, version } = found
  return { ...saving, document, base: document, version, site: document, siteVersion: version }
}

function lookedForLost(saving: Saving, lost: GuideDocument, found: SiteState): Saving {
  const never = { ...saving, lost: null }
  if (found.version === saving.siteVersion) return never
  if (hashOf(found.document) === hashOf(lost)) return landed(saving, lost, lost, found.version)
  // Others have saved as well. If the site's state holds everything that was lost, it did arrive.
  const both = merge(saving.base, lost, found.document)
  const arrived = both.conflicts.length === 0 && hashOf(both.document) === hashOf(found.document)
  return arrived ? landed(saving, lost, found.document, found.version) : never
}

/** What is kept on this device of changes that the site may not have. */
export interface KeptChanges {
  document: GuideDocument
  base: GuideDocument
  version: number
  /** Sent from a page that closed before there was an answer. */
  lost: GuideDocument | null
  at: number
}

export const toKeep = (saving: Saving, at: number): KeptChanges => ({
  document: saving.document,
  base: saving.base,
  version: saving.version,
  lost: saving.sending ?? saving.lost,
  at,
})

/** Takes up what an earlier page kept, beside what the site has now. Where the site has it all, there is nothing left to send. */
export function takeUp(kept: KeptChanges, found: SiteState): Saving {
  const fresh = startSaving(found)
  if (hashOf(kept.document) === hashOf(found.document)) return fresh
  const older: Saving = {
    document: kept.document,
    base: kept.base,
    version: kept.version,
    site: kept.base,
    siteVersion: kept.version,
    sending: null,
    lost: kept.lost,
  }
  if (found.version < kept.version) {
    // The site has gone back to an older state (a restored backup): put the changes on top of it.
    return { ...fresh, document: merge(kept.base, kept.document, found.document, 'mine').document }
  }
  return looked(older, found)
}
