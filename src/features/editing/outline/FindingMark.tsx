import { useTranslation } from 'react-i18next'
import type { Finding } from '../../../../shared/guide/finding'

/** How many findings a place has: the musts if there are any, else the shoulds. */
export function FindingMark({ findings }: { findings: readonly Finding[] }) {
  const { t } = useTranslation('editing')
  const musts = findings.filter((finding) => finding.must).length
  const count = musts > 0 ? musts : findings.length
  if (count === 0) return null
  return (
    <span className={musts > 0 ? 'finding-mark oxide' : 'finding-mark ochre'}>
      <span aria-hidden>{count}</span>
      <span className="visually-hidden">{t(musts > 0 ? 'findings.must' : 'findings.should', { count })}</span>
    </span>
  )
}
