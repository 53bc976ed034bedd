import { useTranslation } from 'react-i18next'
import { Link, useSearchParams } from 'react-router-dom'
import { signInByLink } from '../api/signIn'
import { goOn, nextOf, withNext } from './goOn'
import { TokenPage } from './TokenPage'

/** Opens from the mail that signs in without a password. */
export function LinkPage() {
  const { t } = useTranslation('accounts')
  const [search] = useSearchParams()
  return (
    <TokenPage
      title={t('byLink.title')}
      text={t('byLink.text')}
      submit={t('byLink.submit')}
      onToken={async (token) => {
        await signInByLink(token)
        goOn(nextOf(search))
      }}
      otherwise={
        <Link className="button" to={withNext('/sign-in', search)}>
          {t('byLink.again')}
        </Link>
      }
    />
  )
}
