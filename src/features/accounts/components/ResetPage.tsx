import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { Link, useSearchParams } from 'react-router-dom'
import { AskForMail, ResetPassword } from '../../../../shared/api/accounts'
import { Button } from '../../../components/controls/Button'
import { ErrorSummary } from '../../../components/controls/ErrorSummary'
import { PasswordField } from '../../../components/controls/PasswordField'
import { Status } from '../../../components/controls/Status'
import { TextField } from '../../../components/controls/TextField'
import { useRequestForm } from '../../../lib/useRequestForm'
import { askReset, resetPassword } from '../api/signIn'
import { FormPage } from './FormPage'

/** Without a token it asks for the mail, with one for the new password. */
export function ResetPage() {
  const { t } = useTranslation('accounts')
  const [search] = useSearchParams()
  const token = search.get('token')
  return (
    <FormPage title={t('reset.title')}>
      {token === null ? <AskForLink /> : <ChoosePassword token={token} />}
    </FormPage>
  )
}

function AskForLink() {
  const { t } = useTranslation('accounts')
  const [sentTo, setSentTo] = useState<string | null>(null)
  const form = useRequestForm({
    schema: AskForMail,
    values: { email: '' },
    labels: { email: t('reset.email') },
    send: async ({ email }) => {
      await askReset(email)
      setSentTo(email)
    },
  })
  return (
    <form className="narrow stack" noValidate onSubmit={form.submit}>
      <p>{t('reset.text')}</p>
      <ErrorSummary {...form.summary} />
      <TextField {...form.field('email')} type="email" dir="ltr" autoComplete="username" />
      <div className="actions">
        <Button kind="go" type="submit" busy={form.busy}>
          {t('reset.submit')}
        </Button>
      </div>
      <Status kind="done">{sentTo === null ? null : t('reset.sent', { email: sentTo })}</Status>
    </form>
  )
}

function ChoosePassword({ token }: { token: string }) {
  const { t } = useTranslation('accounts')
  const [done, setDone] = useState(false)
  const form = useRequestForm({
    schema: ResetPassword,
    values: { token, password: '' },
    labels: { password: t('reset.password') },
    send: async (values) => {
      await resetPassword(values)
      setDone(true)
    },
  })
  if (done) {
    return (
      <div className="narrow stack">
        <Status kind="done">{t('reset.done')}</Status>
        <div className="actions">
          <Link className="button go" to="/sign-in">
            {t('signIn.title')}
          </Link>
        </div>
      </div>
    )
  }
  return (
    <form className="narrow stack" noValidate onSubmit={form.submit}>
      <ErrorSummary {...form.summary} />
      <PasswordField
        {...form.field('password')}
        description={t('reset.passwordHint')}
        autoComplete="new-password"
      />
      <div className="actions">
        <Button kind="go" type="submit" busy={form.busy}>
          {t('reset.choose')}
        </Button>
        {form.failure !== null && (
          <Link className="button" to="/reset">
            {t('byLink.again')}
          </Link>
        )}
      </div>
    </form>
  )
}
