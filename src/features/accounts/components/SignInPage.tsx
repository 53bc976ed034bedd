import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { Link, useSearchParams } from 'react-router-dom'
import { Email, SignIn } from '../../../../shared/api/accounts'
import { Button } from '../../../components/controls/Button'
import { ErrorSummary } from '../../../components/controls/ErrorSummary'
import { PasswordField } from '../../../components/controls/PasswordField'
import { Status } from '../../../components/controls/Status'
import { TextField } from '../../../components/controls/TextField'
import { RequestProblem } from '../../../lib/request'
import { useRequestForm } from '../../../lib/useRequestForm'
import { useSentence } from '../../../lib/useSentence'
import { askConfirmation, askLink, demoAccountsQuery, signIn } from '../api/signIn'
import { DemoAccountList } from './DemoAccountList'
import { FormPage } from './FormPage'
import { goOn, nextOf, withNext } from './goOn'

export function SignInPage() {
  const { t } = useTranslation('accounts')
  const [search] = useSearchParams()
  const sentence = useSentence()
  const [said, setSaid] = useState<{ kind: 'done' | 'trouble'; sentence: string } | null>(null)
  const [mailing, setMailing] = useState(false)
  const { data: demo } = useQuery(demoAccountsQuery)
  const form = useRequestForm({
    schema: SignIn,
    values: { email: search.get('email') ?? '', password: '' },
    labels: { email: t('signIn.email'), password: t('signIn.password') },
    send: async (values) => {
      setSaid(null)
      await signIn(values)
      goOn(nextOf(search))
    },
  })
  const unconfirmed = form.failure instanceof RequestProblem && form.failure.kind === 'not-confirmed'

  /** Sends a mail to the address in the form, which must be one. */
  const mailTo = async (send: (email: string) => Promise<unknown>, done: string): Promise<void> => {
    const email = Email.safeParse(form.form.getValues('email'))
    if (!email.success) {
      setSaid({ kind: 'trouble', sentence: t('signIn.linkNeedsAddress') })
      form.form.setFocus('email')
      return
    }
    setMailing(true)
    try {
      await send(email.data)
      setSaid({ kind: 'done', sentence: t(done, { email: email.data }) })
    } catch (error) {
      setSaid({ kind: 'trouble', sentence: sentence(error) })
    } finally {
      setMailing(false)
    }
  }

  return (
    <FormPage title={t('signIn.title')}>
      <div className="grid gap-x-12 gap-y-8 desk:grid-cols-[minmax(0,544px)_minmax(0,1fr)]">
        <form className="stack" noValidate onSubmit={form.submit}>
          {search.has('out') && <Status kind="done">{t('signIn.out')}</Status>}
          {search.has('next') && <Status>{t('needed')}</Status>}
          <ErrorSummary {...form.summary} />
          {unconfirmed && (
            <Button busy={mailing} onClick={() => void mailTo(askConfirmation, 'signUp.sent')}>
              {t('signIn.confirmFirst')}
            </Button>
          )}
          <TextField {...form.field('email')} type="email" dir="ltr" autoComplete="username" />
          <PasswordField {...form.field('password')} autoComplete="current-password" />
          <div className="actions">
            <Button kind="go" type="submit" busy={form.busy}>
              {t('signIn.submit')}
            </Button>
            <Button
              busy={mailing}
              onClick={() =>
                void mailTo((email) => askLink({ email, next: nextOf(search) }), 'signIn.linkSent')
              }
            >
              {t('signIn.link')}
            </Button>
          </div>
          <Status kind={said?.kind ?? 'done'}>{said?.sentence ?? null}</Status>
          <p className="note">
            <Link to="/reset">{t('signIn.forgotten')}</Link>
          </p>
          <p className="note">
            {t('signIn.noAccount')} <Link to={withNext('/sign-up', search)}>{t('signIn.signUp')}</Link>
          </p>
        </form>
        {demo !== undefined && demo.accounts.length > 0 && (
          <DemoAccountList
            demo={demo}
            onTake={(email) => {
              form.form.reset({ email, password: demo.password })
              form.form.setFocus('email')
            }}
          />
        )}
      </div>
    </FormPage>
  )
}
