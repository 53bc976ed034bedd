import type { Asset } from '../../../shared/guide/schema'
import { toDocument } from '../../../shared/importing/toDocument'
import type { Understanding } from '../../../shared/importing/understanding'
import type { Permitted } from '../../auth/person'
import type { SignedIn } from '../../auth/repo'
import type { Context } from '../../context'
import type { Tx } from '../../db/open'
import { readFiles } from '../../files/repo'
import { readDocument, readDraft } from '../../guides/repo'
import { saveDraft } from '../../guides/saveDraft'
import { startGuide } from '../../guides/startGuide'
import { Problem } from '../../http/problem'
import { GuideDocument } from '../../../shared/guide/schema'
import { readImport, setImport, type ImportRow } from './repo'
import { storedUnderstanding } from './presentImport'

/**
 * Makes a guide of what was understood, or adds it to the guide for which it was brought. Once only, in one transaction.
 * @returns the guide's id. @throws Problem bad-request where it is not read yet or was taken before.
 */
export function takeImport(
  ctx: Context,
  person: SignedIn,
  row: ImportRow,
  permitted: Permitted<'edit'> | null,
): string {
  return ctx.db.transaction(
    (tx) => {
      const now = readImport(tx, row.id)
      if (now?.state !== 'understood') throw notNow(now?.state)
      const understanding = storedUnderstanding(now)
      const assets = assetsOf(tx, understanding)
      if (permitted === null) {
        const guideId = startGuide(tx, ctx, person, checked(toDocument(understanding, ctx.newId, assets)))
        setImport(tx, row.id, { state: 'taken', guideId, updatedAt: ctx.now() })
        return guideId
      }
      const draft = readDraft(tx, permitted.guideId)
      if (draft === undefined) throw new Problem('not-found')
      const base = readDocument(tx, draft.documentHash)
      saveDraft(ctx, permitted, checked(toDocument(understanding, ctx.newId, assets, base)), draft.version)
      setImport(tx, row.id, { state: 'taken', updatedAt: ctx.now() })
      return permitted.guideId
    },
    { behavior: 'immediate' },
  )
}

const notNow = (state: ImportRow['state'] | undefined): Problem => {
  const message =
    state === 'taken'
      ? 'This was taken before. Bring the files again to take them once more.'
      : 'The files are not read yet. Wait until they are.'
  return new Problem('bad-request', {}, [{ path: ['state'], message }])
}

/** Together with a guide that is nearly full it may be too much; then nothing is taken. */
function checked(document: GuideDocument): GuideDocument {
  const read = GuideDocument.safeParse(document)
  if (read.success) return read.data
  const errors = read.error.issues.slice(0, 20).map(({ path, message }) => ({
    path: ['understanding', ...path.map((part) => (typeof part === 'symbol' ? String(part) : part))],
    message,
  }))
  throw new Problem('bad-request', {}, errors)
}

function assetsOf(tx: Tx, understanding: Understanding): Map<string, Asset> {
  const figures = understanding.sections.flatMap(({ steps }) => steps.flatMap((step) => step.figures))
  const hashes = [...figures, ...understanding.models].flatMap(({ sha256 }) => sha256 ?? [])
  return new Map(
    readFiles(tx, [...new Set(hashes)]).map(({ asset: { sha256, mediaType, bytes, name } }) => [
      sha256,
      { sha256, mediaType, bytes, name },
    ]),
  )
}
