import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { ChangePassword, type Account } from '../../../../shared/api/accounts'
import { Button } from '../../../components/controls/Button'
import { ErrorSummary } from '../../../components/controls/ErrorSummary'
import { PasswordField } from '../../../components/controls/PasswordField'
import { Status } from '../../../components/controls/Status'
import { useRequestForm } from '../../../lib/useRequestForm'
import { useChangePassword } from '../api/account'

export function PasswordForm({ account }: { account: Account }) {
  const { t } = useTranslation('accounts')
  const [saved, setSaved] = useState(false)
  const change = useChangePassword()
  const form = useRequestForm({
    schema: ChangePassword,
    values: { current: '', password: '' },
    labels: { current: t('account.current'), password: t('account.new') },
    send: async (values) => {
      setSaved(false)
      await change.mutateAsync(values)
      form.form.reset()
      setSaved(true)
    },
  })
  return (
    <form className="stack" noValidate onSubmit={form.submit}>
      {!account.hasPassword && <p className="note">{t('account.noPassword')}</p>}
      <ErrorSummary {...form.summary} />
      {account.hasPassword && <PasswordField {...form.field('current')} autoComplete="current-password" />}
      <PasswordField {...form.field('password')} autoComplete="new-password" />
      <div className="actions">
        <Button type="submit" busy={form.busy}>
          {account.hasPassword ? t('account.changePassword') : t('account.setPassword')}
        </Button>
      </div>
      <Status kind="done">{saved ? t('account.passwordSaved') : null}</Status>
    </form>
  )
}
