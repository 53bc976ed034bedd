import { useTranslation } from 'react-i18next'
import { useDraft } from '../draftStore'
import { usePageTitle } from '../frame/usePageTitle'

/** The draft as a maker will read it. */
export function PreviewPage() {
  const { t } = useTranslation('editing')
  const { document } = useDraft()
  usePageTitle(`${t('preview.title')} · ${document.title}`)
  return <p>{t('preview.title')}</p>
}
