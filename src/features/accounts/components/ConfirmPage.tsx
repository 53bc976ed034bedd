import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { Link } from 'react-router-dom'
import { Status } from '../../../components/controls/Status'
import { confirmAddress } from '../api/signIn'
import { FormPage } from './FormPage'
import { goOn, takeKeptNext } from './goOn'
import { TokenPage } from './TokenPage'

/** Opens from the mail after signing up, and from the mail to a new address. */
export function ConfirmPage() {
  const { t } = useTranslation('accounts')
  const [done, setDone] = useState(false)
  const signIn = (
    <Link className="button" to="/sign-in">
      {t('confirm.signIn')}
    </Link>
  )
  if (done) {
    return (
      <FormPage title={t('confirm.title')}>
        <div className="narrow stack">
          <Status kind="done">{t('confirm.done')}</Status>
          <div className="actions">{signIn}</div>
        </div>
      </FormPage>
    )
  }
  return (
    <TokenPage
      title={t('confirm.title')}
      text={t('confirm.text')}
      submit={t('confirm.submit')}
      otherwise={signIn}
      onToken={async (token) => {
        const { signedIn } = await confirmAddress(token)
        if (signedIn) goOn(takeKeptNext())
        else setDone(true)
      }}
    />
  )
}
