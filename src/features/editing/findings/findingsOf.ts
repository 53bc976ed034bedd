import type { FileEntry } from '../../../../shared/api/files'
import type { Finding } from '../../../../shared/guide/finding'
import type { GuideDocument } from '../../../../shared/guide/schema'

/** What must and should be mended before publishing. */
export function findingsOf(_document: GuideDocument, _files: ReadonlyMap<string, FileEntry>): Finding[] {
  return []
}
