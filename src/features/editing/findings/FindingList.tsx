import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { Link } from 'react-router-dom'
import { Check, X } from 'lucide-react'
import type { Finding } from '../../../../shared/guide/finding'
import { mend } from '../../../../shared/guide/mend'
import { Button } from '../../../components/controls/Button'
import { useDraft } from '../draftStore'
import { findingAddress } from '../frame/addresses'
import { useOpenDraft } from '../frame/sessionContext'

/** The readiness list: musts, shoulds, and what is in order. Each leads to its place; some are mended by one press. */
export function FindingList() {
  const { t } = useTranslation('editing')
  const { findings } = useOpenDraft()
  const musts = findings.filter((finding) => finding.must)
  const shoulds = findings.filter((finding) => !finding.must)
  return (
    <>
      {musts.length > 0 && <Findings title={t('findings.mustTitle')} tone="oxide" list={musts} />}
      {shoulds.length > 0 && <Findings title={t('findings.shouldTitle')} tone="ochre" list={shoulds} />}
      <InOrder />
    </>
  )
}

/** So many are shown at first; a long list would push everything else out of sight. */
const SHOWN = 8

interface FindingsProps {
  title: string
  tone: 'oxide' | 'ochre'
  list: readonly Finding[]
}

function Findings({ title, tone, list }: FindingsProps) {
  const { t } = useTranslation('editing')
  const [all, setAll] = useState(false)
  return (
    <section>
      <h2>
        {title} <b className={tone}>{list.length}</b>
      </h2>
      <ul>
        {(all ? list : list.slice(0, SHOWN)).map((finding, index) => (
          <FindingRow
            key={`${finding.rule} ${finding.place.node ?? ''} ${index}`}
            finding={finding}
            tone={tone}
          />
        ))}
      </ul>
      {!all && list.length > SHOWN && (
        <Button kind="quiet" onClick={() => setAll(true)}>
          {t('findings.showAll', { count: list.length })}
        </Button>
      )}
    </section>
  )
}

function FindingRow({ finding, tone }: { finding: Finding; tone: 'oxide' | 'ochre' }) {
  const { t } = useTranslation('editing')
  const { edit, document, readOnly, announce } = useDraft()
  const { guideId } = useOpenDraft()
  const words = { ns: 'readiness', ...finding.values }
  const mends = !readOnly && mend(document, finding) !== undefined
  const act = (): void => {
    edit((doc) => mend(doc, finding) ?? doc)
    announce(t('findings.mended'))
  }
  return (
    <li>
      <span className={tone} aria-hidden>
        {tone === 'oxide' ? <X size={16} /> : <b>!</b>}
      </span>
      <span dir="auto">
        {t(finding.rule, words)}{' '}
        {mends && (
          <Button kind="quiet" onClick={act}>
            {t(`mend.${finding.rule}`, words)}
          </Button>
        )}
        <Link to={findingAddress(guideId, finding.place)}>{t('findings.goThere')}</Link>
      </span>
    </li>
  )
}

function InOrder() {
  const { t } = useTranslation('editing')
  const { inOrder } = useOpenDraft()
  const [all, setAll] = useState(false)
  if (inOrder.length === 0) return null
  return (
    <section>
      <h2>
        {t('findings.inOrderTitle')} <b className="lichen">{inOrder.length}</b>
      </h2>
      <ul>
        {(all ? inOrder : inOrder.slice(0, 3)).map((rule) => (
          <li key={rule}>
            <span className="lichen" aria-hidden>
              <Check size={16} />
            </span>
            <span>{t(`inOrder.${rule}`, { ns: 'readiness' })}</span>
          </li>
        ))}
      </ul>
      {!all && inOrder.length > 3 && (
        <Button kind="quiet" onClick={() => setAll(true)}>
          {t('findings.showAll', { count: inOrder.length })}
        </Button>
      )}
    </section>
  )
}
