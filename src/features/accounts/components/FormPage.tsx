import type { ReactNode } from 'react'
import { useTranslation } from 'react-i18next'

/** A page with one form in the width of the text. */
export function FormPage({ title, children }: { title: string; children: ReactNode }) {
  const { t } = useTranslation()
  return (
    <div className="sheet form-page">
      <title>{`${title} · ${t('name')}`}</title>
      <h1 className="t4">{title}</h1>
      {children}
    </div>
  )
}
