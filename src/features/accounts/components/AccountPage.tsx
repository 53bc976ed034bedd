import { useTranslation } from 'react-i18next'
import { Link } from 'react-router-dom'
import type { Account } from '../../../../shared/api/accounts'
import { FormSection } from '../../../components/controls/FormSection'
import { EmailForm } from './EmailForm'
import { FormPage } from './FormPage'
import { PasswordForm } from './PasswordForm'
import { ProfileForm } from './ProfileForm'
import { SessionTable } from './SessionTable'

export function AccountPage({ account }: { account: Account }) {
  const { t } = useTranslation('accounts')
  return (
    <FormPage title={t('account.title')}>
      <FormSection title={t('account.profile')} side={t('account.nameSide')}>
        <ProfileForm account={account} />
      </FormSection>
      <FormSection title={t('account.email')} side={t('account.emailSide')}>
        <EmailForm account={account} />
      </FormSection>
      <FormSection title={t('account.password')} side={t('account.passwordSide')}>
        <PasswordForm account={account} />
      </FormSection>
      <FormSection title={t('account.devices')} wide>
        <SessionTable />
      </FormSection>
      <FormSection title={t('account.data')}>
        <p>{t('account.dataText')}</p>
        <div className="actions">
          <a className="button" href="/api/account/data" download>
            {t('account.download')}
          </a>
        </div>
      </FormSection>
      <FormSection title={t('account.leave')}>
        <p>{t('account.leaveText')}</p>
        <div className="actions">
          <Link className="button" to="/account/leave">
            {t('account.leaveGo')}
          </Link>
        </div>
      </FormSection>
    </FormPage>
  )
}
