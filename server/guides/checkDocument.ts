import { repeatedId } from '../../shared/guide/repeatedId'
import type { GuideDocument } from '../../shared/guide/schema'
import type { Tx } from '../db/open'
import { knownFiles } from '../files/repo'
import { Problem } from '../http/problem'
import { fileReferences } from './fileReferences'

/**
 * What the schema cannot see: every file that the document refers to is on the site, and no two nodes have one id.
 * @throws Problem bad-request, naming each file that is missing.
 */
export function checkDocument(tx: Tx, document: GuideDocument): void {
  const references = fileReferences(document)
  const known = knownFiles(tx, [...new Set(references.map(({ sha256 }) => sha256))])
  const missing = references.filter(({ sha256 }) => !known.has(sha256))
  if (missing.length > 0) {
    throw new Problem(
      'bad-request',
      {},
      missing.slice(0, 20).map(({ path, name }) => ({
        path: ['document', ...path],
        message: `The site does not have the file “${name}”. Bring it in again.`,
      })),
    )
  }
  const repeated = repeatedId(document)
  if (repeated !== undefined) {
    const message = `Two parts of the guide have the id ${repeated}. Give the copy an id of its own.`
    throw new Problem('bad-request', {}, [{ path: ['document'], message }])
  }
}
