import { useQuery } from '@tanstack/react-query'
import { useEffect, useRef } from 'react'
import { useTranslation } from 'react-i18next'
import { Navigate, Outlet, ScrollRestoration, useLocation } from 'react-router-dom'
import { Busy } from '../components/controls/Busy'
import { Button } from '../components/controls/Button'
import { Status } from '../components/controls/Status'
import { accountQuery } from '../features/accounts/api/account'
import { useSentence } from '../lib/useSentence'
import { Head } from './head'

/** Pages that need no account; every other one leads to signing in and back. */
const OPEN = /^\/(sign-in|sign-up|confirm|reset|invitations)(\/|$)/

/** What stands round every page of the application. Focus goes to the text when the address changes. */
export function Frame() {
  const { t } = useTranslation()
  const { pathname, search } = useLocation()
  const { data: account, error, refetch } = useQuery(accountQuery)
  const sentence = useSentence()
  const main = useRef<HTMLElement>(null)
  const first = useRef(true)
  useEffect(() => {
    if (first.current) first.current = false
    else main.current?.focus()
  }, [pathname])
  const closed = !OPEN.test(pathname)
  return (
    <>
      <a className="skip" href="#text">
        {t('skip')}
      </a>
      <Head account={account} />
      <main id="text" ref={main} tabIndex={-1}>
        {closed && account === undefined && error === null && (
          <div className="sheet form-page">
            <Busy />
          </div>
        )}
        {closed && account === undefined && error !== null && (
          <div className="sheet form-page stack">
            <Status kind="trouble">{sentence(error)}</Status>
            <Button onClick={() => void refetch()}>{t('tryAgain')}</Button>
          </div>
        )}
        {closed && account === null && (
          <Navigate replace to={`/sign-in?${new URLSearchParams({ next: pathname + search })}`} />
        )}
        {(!closed || (account !== null && account !== undefined)) && <Outlet />}
      </main>
      <ScrollRestoration />
    </>
  )
}
