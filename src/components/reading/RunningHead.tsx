import { useTranslation } from 'react-i18next'

/** The line at the head of every page: mark, places, and who is signed in. On a phone the places fold into a menu without script. */
export function RunningHead({ current }: { current?: 'library' | 'drafts' }) {
  const { t } = useTranslation('shell')
  const places = (
    <>
      <a href="/guides" aria-current={current === 'library' ? 'page' : undefined}>
        {t('library')}
      </a>
      <a href="/drafts" aria-current={current === 'drafts' ? 'page' : undefined}>
        {t('drafts')}
      </a>
    </>
  )
  const account = (
    <a href="/sign-in" data-account>
      {t('signIn')}
    </a>
  )
  return (
    <header className="running-head">
      <div className="sheet">
        <a className="brand" href="/guides">
          <svg viewBox="0 0 16 16" aria-hidden="true">
            <path d="M10 1h2v6h-2z" fill="var(--oxide)" />
            <path d="M2 10V8c0-2 2.500-3 6-3s6 1 6 3v2zM1 11h14v4H1z" fill="currentColor" />
          </svg>
          {t('name')}
        </a>
        <nav aria-label={t('places')}>{places}</nav>
        <div className="here">{account}</div>
        <details className="menu">
          <summary className="button">{t('menu')}</summary>
          <nav aria-label={t('menu')}>
            {places}
            {account}
          </nav>
        </details>
      </div>
    </header>
  )
}
