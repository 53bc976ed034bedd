import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { ChangeEmail, type Account } from '../../../../shared/api/accounts'
import { Button } from '../../../components/controls/Button'
import { ErrorSummary } from '../../../components/controls/ErrorSummary'
import { Status } from '../../../components/controls/Status'
import { TextField } from '../../../components/controls/TextField'
import { useRequestForm } from '../../../lib/useRequestForm'
import { changeEmail } from '../api/account'

export function EmailForm({ account }: { account: Account }) {
  const { t } = useTranslation('accounts')
  const [sentTo, setSentTo] = useState<string | null>(null)
  const form = useRequestForm({
    schema: ChangeEmail,
    values: { email: '' },
    labels: { email: t('account.newEmail') },
    send: async ({ email }) => {
      setSentTo(null)
      await changeEmail(email)
      setSentTo(email)
    },
  })
  return (
    <form className="stack" noValidate onSubmit={form.submit}>
      <p className="note">{t('account.emailNow', { email: account.email })}</p>
      <ErrorSummary {...form.summary} />
      <TextField {...form.field('email')} type="email" dir="ltr" autoComplete="email" />
      <div className="actions">
        <Button type="submit" busy={form.busy}>
          {t('account.changeEmail')}
        </Button>
      </div>
      <Status kind="done">{sentTo === null ? null : t('account.emailSent', { email: sentTo })}</Status>
    </form>
  )
}
