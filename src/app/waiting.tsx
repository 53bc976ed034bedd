import { useTranslation } from 'react-i18next'
import { Busy } from '../components/controls/Busy'

/** Stands while the first page's code is fetched: the mark, and a word when the wait is felt. */
export function Waiting() {
  const { t } = useTranslation()
  return (
    <>
      <header className="running-head">
        <div className="sheet">
          <a className="brand" href="/guides">
            {t('name')}
          </a>
        </div>
      </header>
      <main className="sheet form-page">
        <Busy />
      </main>
    </>
  )
}
