import { useEffect, useState, type ReactNode } from 'react'
import { useTranslation } from 'react-i18next'

/** Shorter waits show nothing: a flicker is worse than a moment's stillness. */
const SHOW_AFTER_MS = 250

/** Something is being fetched. A plain line with a word; shown only when the wait is felt. */
export function Busy({ children }: { children?: ReactNode }) {
  const { t } = useTranslation('controls')
  const [shown, setShown] = useState(false)
  useEffect(() => {
    const timer = setTimeout(() => setShown(true), SHOW_AFTER_MS)
    return () => clearTimeout(timer)
  }, [])
  return (
    <div className="busy" role="status" aria-busy="true">
      {shown && (children ?? t('loading'))}
    </div>
  )
}
