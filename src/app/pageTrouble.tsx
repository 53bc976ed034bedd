import { useTranslation } from 'react-i18next'
import { useRouteError } from 'react-router-dom'

/** Shown where a page failed to load or to draw, with the sentence of the refusal if there is one. */
export function PageTrouble() {
  const { t } = useTranslation()
  const error = useRouteError()
  return (
    <main className="sheet py-12">
      <h1 className="t4">{t('failed')}</h1>
      <p className="mt-4">{error instanceof Error ? error.message : String(error)}</p>
      <p className="mt-6">
        <button type="button" className="button" onClick={() => location.reload()}>
          {t('tryAgain')}
        </button>
      </p>
    </main>
  )
}
