import { useEffect, useRef } from 'react'
import { useTranslation } from 'react-i18next'
import { Outlet, ScrollRestoration, useLocation } from 'react-router-dom'
import { RunningHead } from '../components/reading/RunningHead'

/** What stands round every page of the application. Focus goes to the text when the address changes. */
export function Frame() {
  const { t } = useTranslation()
  const { pathname } = useLocation()
  const main = useRef<HTMLElement>(null)
  const first = useRef(true)
  useEffect(() => {
    if (first.current) first.current = false
    else main.current?.focus()
  }, [pathname])
  return (
    <>
      <a className="skip" href="#text">
        {t('skip')}
      </a>
      <RunningHead current="drafts" />
      <main id="text" ref={main} tabIndex={-1}>
        <Outlet />
      </main>
      <ScrollRestoration />
    </>
  )
}
