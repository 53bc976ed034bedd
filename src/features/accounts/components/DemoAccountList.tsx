import { useTranslation } from 'react-i18next'
import type { DemoAccounts } from '../../../../shared/api/accounts'
import { Button } from '../../../components/controls/Button'

/** The invented people of the demo, each with one press to fill the form. */
export function DemoAccountList({ demo, onTake }: { demo: DemoAccounts; onTake: (email: string) => void }) {
  const { t } = useTranslation('accounts')
  return (
    <section aria-labelledby="demo-accounts">
      <h2 className="t1" id="demo-accounts">
        {t('signIn.demoTitle')}
      </h2>
      <p className="note mt-2">{t('signIn.demoHint', { password: demo.password })}</p>
      <table className="ledger mt-4">
        <tbody>
          {demo.accounts.map(({ name, email, role }) => (
            <tr key={email}>
              <td>
                <span className="name">{name}</span>
                <small>
                  <bdi>{email}</bdi>
                </small>
              </td>
              <td>{t(`people:site.roles.${role}`)}</td>
              <td className="act">
                <Button
                  kind="quiet"
                  aria-label={t('signIn.demoTake', { name })}
                  onClick={() => onTake(email)}
                >
                  {t('signIn.demoFill')}
                </Button>
              </td>
            </tr>
          ))}
        </tbody>
      </table>
    </section>
  )
}
