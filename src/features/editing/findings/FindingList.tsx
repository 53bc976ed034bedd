import { useTranslation } from 'react-i18next'
import { Link } from 'react-router-dom'
import { Check, X } from 'lucide-react'
import type { Finding } from '../../../../shared/guide/finding'
import { Button } from '../../../components/controls/Button'
import { useDraft } from '../draftStore'
import { findingAddress } from '../frame/addresses'
import { useOpenDraft } from '../frame/sessionContext'
import { mendOf } from './mendOf'

/** The readiness list: musts, shoulds, and that the rest is in order. Each leads to its place; some are mended by one press. */
export function FindingList() {
  const { t } = useTranslation('editing')
  const { findings } = useOpenDraft()
  const musts = findings.filter((finding) => finding.must)
  const shoulds = findings.filter((finding) => !finding.must)
  return (
    <>
      {musts.length > 0 && (
        <Findings title={t('findings.mustTitle')} count={musts.length} tone="oxide" list={musts} />
      )}
      {shoulds.length > 0 && (
        <Findings title={t('findings.shouldTitle')} count={shoulds.length} tone="ochre" list={shoulds} />
      )}
      {musts.length === 0 && (
        <p className="in-order">
          <Check className="lichen" size={18} aria-hidden />
          {t(shoulds.length === 0 ? 'findings.allInOrder' : 'findings.mayPublish')}
        </p>
      )}
    </>
  )
}

interface FindingsProps {
  title: string
  count: number
  tone: 'oxide' | 'ochre'
  list: readonly Finding[]
}

function Findings({ title, count, tone, list }: FindingsProps) {
  return (
    <section>
      <h3>
        {title} <b className={tone}>{count}</b>
      </h3>
      <ul>
        {list.map((finding, index) => (
          <FindingRow
            key={`${finding.rule} ${finding.place.node ?? ''} ${index}`}
            finding={finding}
            tone={tone}
          />
        ))}
      </ul>
    </section>
  )
}

function FindingRow({ finding, tone }: { finding: Finding; tone: 'oxide' | 'ochre' }) {
  const { t } = useTranslation('editing')
  const { edit, document, readOnly, announce } = useDraft()
  const { guideId } = useOpenDraft()
  const mend = readOnly ? undefined : mendOf(finding, document)
  return (
    <li>
      <span className={tone} aria-hidden>
        {tone === 'oxide' ? <X size={16} /> : <b className="bang">!</b>}
      </span>
      <span>
        {t(finding.rule, { ns: 'readiness', ...finding.values })}{' '}
        {mend !== undefined && (
          <Button
            kind="quiet"
            onClick={() => {
              edit(mend.change)
              announce(t('findings.mended'))
            }}
          >
            {t(mend.says, mend.values)}
          </Button>
        )}
        <Link to={findingAddress(guideId, finding.place)}>{t('findings.goThere')}</Link>
      </span>
    </li>
  )
}
