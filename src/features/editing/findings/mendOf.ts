import type { Finding } from '../../../../shared/guide/finding'
import { reconcile, takeFromSteps } from '../../../../shared/guide/reconcile'
import type { GuideDocument } from '../../../../shared/guide/schema'
import type { Change } from '../draftStore'

/** A change that mends a finding by one press, and what its button says. */
export interface Mend {
  change: Change
  says: string
  values: Record<string, string | number>
}

/** @returns undefined for a finding that a person has to think about. */
export function mendOf(finding: Finding, document: GuideDocument): Mend | undefined {
  const { node, page } = finding.place
  if (page !== 'parts' || node === null || !document.lines.some((line) => line.id === node)) return undefined
  const found = reconcile(document).lines.find((line) => line.line === node)
  if (
    found === undefined ||
    found.used === null ||
    !['more used', 'more listed', 'no quantity'].includes(found.balance)
  )
    return undefined
  return {
    change: (doc) => takeFromSteps(doc, node),
    says: 'findings.list',
    values: { quantity: `${found.used.value}${found.used.unit === 'each' ? '' : ` ${found.used.unit}`}` },
  }
}
