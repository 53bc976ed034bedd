import type { ReactNode } from 'react'
import { useTranslation } from 'react-i18next'
import { useDraft } from '../draftStore'
import { usePageTitle } from './usePageTitle'

/** The parts list as a page of the draft. */
export function PartsPage({ children }: { children: ReactNode }) {
  const { t } = useTranslation('editing')
  const { document } = useDraft()
  usePageTitle(`${t('place.parts')} · ${document.title}`)
  return (
    <article className="parts-fields">
      <h1 className="t4">{t('place.parts')}</h1>
      {children}
    </article>
  )
}
