import { useTranslation } from 'react-i18next'

export function MissingPage() {
  const { t } = useTranslation('shell')
  return (
    <main id="text" className="sheet missing">
      <h1 className="t4 page-title">{t('notFound')}</h1>
      <p>{t('notFoundHint')}</p>
      <p className="actions">
        <a className="button" href="/guides">
          {t('library')}
        </a>
      </p>
    </main>
  )
}
