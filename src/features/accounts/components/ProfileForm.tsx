import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { ChangeAccount, INTERFACE_LANGUAGES, type Account } from '../../../../shared/api/accounts'
import { Button } from '../../../components/controls/Button'
import { ErrorSummary } from '../../../components/controls/ErrorSummary'
import { Select } from '../../../components/controls/Select'
import { Status } from '../../../components/controls/Status'
import { TextField } from '../../../components/controls/TextField'
import { chooseLanguage } from '../../../lib/interfaceLanguage'
import { useRequestForm } from '../../../lib/useRequestForm'
import { useChangeAccount } from '../api/account'

/** Name and language. Each language is called by its own name. */
export function ProfileForm({ account }: { account: Account }) {
  const { t, i18n } = useTranslation('accounts')
  const [saved, setSaved] = useState(false)
  const change = useChangeAccount()
  const form = useRequestForm({
    schema: ChangeAccount,
    values: {
      name: account.name,
      language: INTERFACE_LANGUAGES.find((language) => language === account.language) ?? 'en',
    },
    labels: { name: t('account.name'), language: t('account.language') },
    send: async (values) => {
      setSaved(false)
      const { language } = await change.mutateAsync(values)
      const known = INTERFACE_LANGUAGES.find((each) => each === language)
      if (known !== undefined && known !== i18n.language) chooseLanguage(known)
      else setSaved(true)
    },
  })
  const options = INTERFACE_LANGUAGES.map((language) => ({
    value: language,
    label: new Intl.DisplayNames([language], { type: 'language' }).of(language) ?? language,
  }))
  return (
    <form className="stack" noValidate onSubmit={form.submit}>
      <ErrorSummary {...form.summary} />
      <TextField {...form.field('name')} autoComplete="name" />
      <Select {...form.field('language')} options={options} />
      <div className="actions">
        <Button type="submit" busy={form.busy}>
          {t('account.save')}
        </Button>
      </div>
      <Status kind="done">{saved ? t('account.saved') : null}</Status>
    </form>
  )
}
