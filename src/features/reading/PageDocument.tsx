import type { ReactNode } from 'react'
import type { TFunction } from 'i18next'
import { useTranslation } from 'react-i18next'
import type { PageData, PageRequest } from '../../../shared/api/pages'
import { directionOf } from '../../../shared/lib/language/direction'
import { RunningHead } from '../../components/reading/RunningHead'
import { LANGUAGES } from '../../lib/i18n'
import { FrontPage } from './FrontPage'
import { LibraryPage } from './LibraryPage'
import { ModelsPage, PartsPage } from './ListPages'
import { MissingPage } from './MissingPage'
import { RevisionsPage } from './RevisionsPage'
import { AllStepsPage, StepPage } from './StepPages'
import { pictureOf, structuredData } from './structuredData'

/** A whole reading page: head, running head, the page, and the way to another language. */
export function PageDocument({ request }: { request: PageRequest }) {
  const { t } = useTranslation('reading')
  const { data, language, style, script } = request
  return (
    <html lang={language} dir={directionOf(language)}>
      <head>
        <meta charSet="utf-8" />
        <meta name="viewport" content="width=device-width, initial-scale=1" />
        <Meta request={request} />
        <style dangerouslySetInnerHTML={{ __html: style }} />
        <link rel="icon" href="/favicon.svg" type="image/svg+xml" />
        <link rel="alternate" type="application/atom+xml" href="/feed.atom" title={t('libraryFeed')} />
      </head>
      <body>
        <a className="skip" href="#text">
          {t('shell:skip')}
        </a>
        <RunningHead current="library" />
        <Page data={data} />
        <Languages path={request.path} />
        <script type="module" src={script} data-fonts={request.fonts} id="reader" />
      </body>
    </html>
  )
}

function Page({ data }: { data: PageData }): ReactNode {
  switch (data.page) {
    case 'library':
      return <LibraryPage library={data.library} />
    case 'front':
      return <FrontPage guide={data.guide} />
    case 'steps':
      return <AllStepsPage guide={data.guide} />
    case 'step':
      return <StepPage guide={data.guide} step={data.step} />
    case 'parts':
      return <PartsPage guide={data.guide} />
    case 'models':
      return <ModelsPage guide={data.guide} />
    case 'revisions':
      return <RevisionsPage guide={data.guide} />
    case 'missing':
      return <MissingPage />
  }
}

function Meta({ request }: { request: PageRequest }) {
  const { t } = useTranslation('reading')
  const { data, origin, path, language } = request
  const here = `${origin}${path}`
  if (data.page === 'missing') return <title>{`${t('shell:notFound')} · Quern`}</title>
  if (data.page === 'library') {
    return (
      <>
        <title>{`${t('findAGuide')} · Quern`}</title>
        <meta name="description" content={t('libraryIs')} />
        <link rel="canonical" href={`${origin}/guides`} />
        <Alternates address={`${origin}/guides`} />
      </>
    )
  }
  const { guide } = data
  const title = titleOf(data, t)
  const picture = pictureOf(guide)
  // The latest revision is the one to be found; an older one points at itself, since its text differs.
  const latest = guide.revisions[0]?.id === guide.revision.id
  const canonical = latest ? here.replace(/(\/guides\/[^/]+)\/revisions\/[^/]+/, '$1') : here
  return (
    <>
      <title>{`${title} · Quern`}</title>
      <meta name="description" content={guide.document.summary.slice(0, 300)} />
      <link rel="canonical" href={canonical} />
      <Alternates address={canonical} />
      <link
        rel="alternate"
        type="application/atom+xml"
        href={`/guides/${guide.slug}/feed.atom`}
        title={guide.document.title}
      />
      <meta property="og:type" content="article" />
      <meta property="og:title" content={title} />
      <meta property="og:description" content={guide.document.summary.slice(0, 300)} />
      <meta property="og:url" content={canonical} />
      <meta property="og:site_name" content="Quern" />
      <meta property="og:locale" content={language} />
      {picture !== null && <meta property="og:image" content={`${origin}${picture}`} />}
      {data.page === 'front' && (
        <script
          type="application/ld+json"
          dangerouslySetInnerHTML={{ __html: structuredData(guide, origin) }}
        />
      )}
    </>
  )
}

function titleOf(data: Exclude<PageData, { page: 'library' | 'missing' }>, t: TFunction<'reading'>): string {
  const { title } = data.guide.document
  if (data.page === 'front') return title
  if (data.page === 'step') return `${t('stepNumber', { number: data.step })} · ${title}`
  return `${t(`place.${data.page}`)} · ${title}`
}

/** The same page with the interface in each language. */
function Alternates({ address }: { address: string }) {
  return (
    <>
      {LANGUAGES.map((language) => (
        <link key={language} rel="alternate" hrefLang={language} href={`${address}?lang=${language}`} />
      ))}
      <link rel="alternate" hrefLang="x-default" href={address} />
    </>
  )
}

const NAMES: Record<(typeof LANGUAGES)[number], string> = { en: 'English', ar: 'العربية' }

function Languages({ path }: { path: string }) {
  const { t, i18n } = useTranslation('reading')
  return (
    <nav className="sheet languages" aria-label={t('interfaceLanguage')}>
      {LANGUAGES.map((language) => (
        <a
          key={language}
          href={`${path}?lang=${language}`}
          lang={language}
          hrefLang={language}
          data-language={language}
          aria-current={language === i18n.language ? 'true' : undefined}
        >
          {NAMES[language]}
        </a>
      ))}
    </nav>
  )
}
