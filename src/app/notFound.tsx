import { useTranslation } from 'react-i18next'

export function NotFound() {
  const { t } = useTranslation()
  return (
    <div className="sheet py-12">
      <h1 className="t4">{t('notFound')}</h1>
      <p className="mt-4">{t('notFoundHint')}</p>
      <p className="mt-6">
        <a className="button" href="/guides">
          {t('library')}
        </a>
      </p>
    </div>
  )
}
