import type { ReactNode } from 'react'
import type { GuideData } from '../../../shared/api/pages'
import { GuideContext, useGuide, viewOf } from '../../components/reading/guideView'
import { TitleBlock } from '../../components/reading/TitleBlock'
import { useOwnLanguage, useWords } from '../../components/reading/useWords'

export type GuidePlace = 'front' | 'steps' | 'parts' | 'models' | 'revisions'

/** Where a guide's pages are: the latest at its short address, a revision at its own for ever. */
export const baseOf = (guide: GuideData): string =>
  `/guides/${guide.slug}${guide.pinned ? `/revisions/${guide.revision.label}` : ''}`

/** What stands round every page of a guide: its name, its places, the title block and the deferral to local codes. */
export function GuideFrame({
  guide,
  place,
  step,
  children,
}: {
  guide: GuideData
  place: GuidePlace
  /** The number of the step on a page of its own. */
  step?: number
  children: ReactNode
}) {
  const base = baseOf(guide)
  return (
    <GuideContext.Provider value={viewOf(guide.document, guide.files, base, guide.revision.label)}>
      <div className="sheet">
        <GuideHead guide={guide} place={place} />
      </div>
      <main id="text" className="sheet">
        <Superseded guide={guide} />
        {children}
      </main>
      <Foot guide={guide} step={step} />
    </GuideContext.Provider>
  )
}

function GuideHead({ guide, place }: { guide: GuideData; place: GuidePlace }) {
  const { t, date, isolated } = useWords()
  const own = useOwnLanguage()
  const base = baseOf(guide)
  const latest = guide.revisions[0]?.id === guide.revision.id
  const places: [GuidePlace, string][] = [
    ['front', base],
    ['steps', `${base}/steps`],
    ['parts', `${base}/parts`],
    ...(guide.document.models.length > 0 ? ([['models', `${base}/models`]] as [GuidePlace, string][]) : []),
    ['revisions', `${base}/revisions`],
  ]
  const revision = [
    `${guide.byline} · ${t('revision', { label: isolated(guide.revision.label) })}`,
    ...(latest ? [t('current')] : []),
    date(guide.revision.publishedAt),
  ].join(t('comma'))
  return (
    <>
      <div className="guide-head">
        {place !== 'front' && (
          <a className="title" href={base} {...own}>
            {guide.document.title}
          </a>
        )}
        <span className="revision">{revision}</span>
      </div>
      <nav className="tabs" aria-label={t('inThisGuide')}>
        {places.map(([name, address]) => (
          <a key={name} href={address} aria-current={name === place ? 'page' : undefined}>
            {t(`place.${name}`)}
          </a>
        ))}
      </nav>
    </>
  )
}

/** An older revision says so, and where the current one is. */
function Superseded({ guide }: { guide: GuideData }) {
  const { t, isolated } = useWords()
  const latest = guide.revisions[0]
  if (latest === undefined || latest.id === guide.revision.id) return null
  return (
    <p className="superseded" role="note">
      {t('superseded', { label: isolated(guide.revision.label), latest: isolated(latest.label) })}{' '}
      <a href={`/guides/${guide.slug}`}>{t('readLatest', { label: isolated(latest.label) })}</a>
    </p>
  )
}

function Foot({ guide, step }: { guide: GuideData; step: number | undefined }) {
  const { t, date, isolated } = useWords()
  const own = useOwnLanguage()
  const { revision, document } = guide
  const { numbers } = useGuide()
  return (
    <footer className="sheet">
      <TitleBlock
        hash={revision.documentHash}
        facts={[
          [
            t('guide'),
            <span key="title" {...own}>
              {document.title}
            </span>,
          ],
          [
            t('revisionWord'),
            t('labelDated', { label: isolated(revision.label), date: date(revision.publishedAt) }),
          ],
          step === undefined
            ? [t('by'), guide.byline]
            : [t('step'), t('ofAll', { number: step, count: numbers.steps })],
          [t('licence'), document.licence],
        ]}
      />
      <p className="foot">{t('deferral')}</p>
    </footer>
  )
}
