import { useMemo, type MouseEvent } from 'react'
import { useTranslation } from 'react-i18next'
import { Link } from 'react-router-dom'
import { CautionView } from '../../../components/reading/CautionView'
import { GuideReading } from '../../../components/reading/GuideReading'
import { GuideContext, viewOf, type GuideView } from '../../../components/reading/guideView'
import { PartsTable } from '../../../components/reading/PartsTable'
import { directionOf } from '../../../../shared/lib/language/direction'
import { useDraft } from '../draftStore'
import { draftAddress, previewAddress } from '../frame/addresses'
import { useOpenDraft } from '../frame/sessionContext'
import { usePageTitle } from '../frame/usePageTitle'

/** The draft as a maker will read it, drawn by the very components of the reading pages, with the parts as designed. */
export function PreviewPage() {
  const { t } = useTranslation('editing')
  const { document, files, choices } = useDraft()
  const { guideId, view } = useOpenDraft()
  usePageTitle(`${t('preview.title')} · ${document.title}`)
  const base = previewAddress(guideId)
  const label = view.guide.latest?.label ?? ''
  const guide = useMemo(
    () => viewOf(document, [...files.values()], base, label, choices),
    [document, files, base, label, choices],
  )
  const { doc } = guide
  return (
    <div className="preview" onClick={(event) => stayInPreview(event, guide)}>
      <p className="note preview-hint">
        {t('preview.hint')} <Link to={draftAddress(guideId)}>{t('preview.back')}</Link>
      </p>
      <GuideContext.Provider value={guide}>
        <div className="preview-front" lang={doc.lang} dir={directionOf(doc.lang)}>
          <h1 className="t6">{doc.title === '' ? t('frame.untitled') : doc.title}</h1>
          <p className="lede">{doc.summary}</p>
        </div>
        {doc.cautions.map((caution) => (
          <CautionView key={caution.id} caution={caution} />
        ))}
        {doc.lines.length > 0 && <PartsTable caption={t('place.parts')} />}
        <GuideReading />
      </GuideContext.Provider>
    </div>
  )
}

/** Links of a reading page lead to other reading pages; here everything is on one. */
function stayInPreview(event: MouseEvent, { base, doc, numbers }: GuideView): void {
  const link = event.target instanceof Element ? event.target.closest('a') : null
  const address = link?.getAttribute('href') ?? ''
  if (!address.startsWith(`${base}/`)) return
  event.preventDefault()
  const step = /\/steps\/(\d+)$/.exec(address)?.[1]
  const id =
    step === undefined
      ? address.split('#')[1]
      : doc.sections
          .flatMap(({ steps }) => steps)
          .find(({ id: stepId }) => numbers.step[stepId] === Number(step))?.id
  const place = id === undefined ? null : window.document.getElementById(id)
  if (place === null) return
  place.scrollIntoView()
  place.tabIndex = -1
  place.focus({ preventScroll: true })
}
