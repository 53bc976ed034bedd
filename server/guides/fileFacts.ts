import type { Facts } from '../../shared/guide/facts'
import type { GuideDocument } from '../../shared/guide/schema'
import type { Tx } from '../db/open'
import { presentFile } from '../files/presentFile'
import { readFiles } from '../files/repo'
import { fileReferences } from './fileReferences'

/** What readiness asks of a document's files. */
export function fileFacts(tx: Tx, document: GuideDocument): Facts {
  const files = readFiles(
    tx,
    fileReferences(document).map(({ sha256 }) => sha256),
  ).map(presentFile)
  return { files: new Map(files.map((file) => [file.sha256, file])) }
}
