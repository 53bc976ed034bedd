import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { Link, useSearchParams } from 'react-router-dom'
import { INTERFACE_LANGUAGES, SignUp } from '../../../../shared/api/accounts'
import { Button } from '../../../components/controls/Button'
import { ErrorSummary } from '../../../components/controls/ErrorSummary'
import { PasswordField } from '../../../components/controls/PasswordField'
import { TextField } from '../../../components/controls/TextField'
import { useRequestForm } from '../../../lib/useRequestForm'
import { signUp } from '../api/signIn'
import { FormPage } from './FormPage'
import { LookIntoMail } from './LookIntoMail'
import { keepNext, withNext } from './goOn'

export function SignUpPage() {
  const { t, i18n } = useTranslation('accounts')
  const [search] = useSearchParams()
  const [sentTo, setSentTo] = useState<string | null>(null)
  const form = useRequestForm({
    schema: SignUp,
    values: {
      name: '',
      email: search.get('email') ?? '',
      password: '',
      language: INTERFACE_LANGUAGES.find((language) => language === i18n.language) ?? 'en',
    },
    labels: { name: t('signUp.name'), email: t('signUp.email'), password: t('signUp.password') },
    send: async (values) => {
      await signUp(values)
      keepNext(search)
      setSentTo(values.email)
    },
  })
  if (sentTo !== null) return <LookIntoMail email={sentTo} onOther={() => setSentTo(null)} />
  return (
    <FormPage title={t('signUp.title')}>
      <form className="narrow stack" noValidate onSubmit={form.submit}>
        <p>{t('signUp.why')}</p>
        <ErrorSummary {...form.summary} />
        <TextField {...form.field('name')} description={t('signUp.nameHint')} autoComplete="name" />
        <TextField
          {...form.field('email')}
          description={t('signUp.emailHint')}
          type="email"
          dir="ltr"
          autoComplete="email"
        />
        <PasswordField
          {...form.field('password')}
          description={t('signUp.passwordHint')}
          autoComplete="new-password"
        />
        <div className="actions">
          <Button kind="go" type="submit" busy={form.busy}>
            {t('signUp.submit')}
          </Button>
        </div>
        <p className="note">
          {t('signUp.haveOne')} <Link to={withNext('/sign-in', search)}>{t('signIn.title')}</Link>
        </p>
      </form>
    </FormPage>
  )
}
