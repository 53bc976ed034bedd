import type { FileEntry } from '../../../../shared/api/files'
import type { Finding } from '../../../../shared/guide/finding'
import { readiness, rulesInOrder, type RuleName } from '../../../../shared/guide/readiness'
import type { GuideDocument } from '../../../../shared/guide/schema'

export interface Judged {
  findings: readonly Finding[]
  inOrder: readonly RuleName[]
}

/** What must and should be mended before publishing, and what is in order. */
export function judge(document: GuideDocument, files: ReadonlyMap<string, FileEntry>): Judged {
  const facts = { files }
  const findings = readiness(document, facts)
  return { findings, inOrder: rulesInOrder(document, facts, findings) }
}
