import { z } from 'zod'
import { GuideDocument } from '../../../../shared/guide/schema'
import { forget, keep, keptUnder } from '../../../lib/kept/kept'
import type { KeptChanges } from './saving'

const Kept = z.object({
  document: GuideDocument,
  base: GuideDocument,
  version: z.number().int(),
  lost: GuideDocument.nullable(),
  at: z.number(),
})

/** Unsent changes of one person's open page. Each page (tab) keeps its own, and the next page takes up what a closed one left. */
export interface KeptDrafts {
  keep: (changes: KeptChanges) => Promise<void>
  /** The site has everything. */
  forget: () => Promise<void>
  /** What pages that are no longer open have left, the oldest first; it stays kept until `drop`. */
  left: () => Promise<{ changes: KeptChanges; drop: () => Promise<void> }[]>
  /** Says that the page is open, so that no other one takes its changes up. */
  hold: () => void
  letGo: () => void
}

/**
 * Whether a page is still open is told by a lock that it holds for as long as it lives. Where the browser has no locks (a site
 * without https) every kept change is taken up: sending one twice changes nothing.
 */
export function keptDrafts(personId: string, guideId: string, pageId: string): KeptDrafts {
  const prefix = `draft/${personId}/${guideId}/`
  const own = prefix + pageId
  let release: () => void = () => undefined
  return {
    keep: (changes) => keep(own, changes),
    forget: () => forget(own),
    left: async () => {
      const found = await keptUnder(prefix)
      const mine = await Promise.all(
        found.map(async ({ key, value }) => (key !== own && (await isFree(key)) ? { key, value } : null)),
      )
      return mine
        .flatMap((entry) => {
          const changes = Kept.safeParse(entry?.value)
          return entry !== null && changes.success
            ? [{ changes: changes.data, drop: () => forget(entry.key) }]
            : []
        })
        .sort((a, b) => a.changes.at - b.changes.at)
    },
    hold: () => {
      release()
      release = holdLock(own)
    },
    letGo: () => release(),
  }
}

// The type says that there always are locks; a page without https has none.
const locks = (): LockManager | undefined => navigator.locks as LockManager | undefined

function holdLock(name: string): () => void {
  let release: () => void = () => undefined
  const until = new Promise<void>((resolve) => (release = resolve))
  void locks()?.request(name, () => until)
  return release
}

async function isFree(name: string): Promise<boolean> {
  const held = await locks()?.query()
  return !(held?.held ?? []).some((lock) => lock.name === name)
}
