import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import type { InvitationEntry } from '../../../../shared/api/people'
import { Button } from '../../../components/controls/Button'
import { Status } from '../../../components/controls/Status'
import { localeOf } from '../../../lib/localeOf'
import { useSentence } from '../../../lib/useSentence'
import { useChangePeople } from '../api/guidePeople'
import { useRoleWords } from './roleWords'

export function InvitationTable(props: { guideId: string; invitations: InvitationEntry[] }) {
  const { t, i18n } = useTranslation('people')
  const sentence = useSentence()
  const roleWords = useRoleWords()
  const change = useChangePeople(props.guideId)
  const [withdrawn, setWithdrawn] = useState(false)
  const day = new Intl.DateTimeFormat(localeOf(i18n.language), { dateStyle: 'medium' })
  return (
    <>
      <table className="ledger fold">
        <thead>
          <tr>
            <th>{t('address')}</th>
            <th>{t('role')}</th>
            <th>{t('until')}</th>
            <th>
              <span className="visually-hidden">{t('withdraw')}</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {props.invitations.map((invitation) => (
            <tr key={invitation.id}>
              <td>
                <bdi>{invitation.email}</bdi>
              </td>
              <td>{roleWords(invitation)}</td>
              <td data-l={t('until')}>
                {day.format(new Date(invitation.expiresAt))}
                {invitation.expired && <small className="ochre">{t('expired')}</small>}
              </td>
              <td className="act">
                <Button
                  kind="quiet"
                  className="small"
                  disabled={change.isPending}
                  aria-label={t('withdrawOf', { email: invitation.email })}
                  onClick={() =>
                    change.mutate(
                      { act: 'withdraw', invitationId: invitation.id },
                      { onSuccess: () => setWithdrawn(true) },
                    )
                  }
                >
                  {t('withdraw')}
                </Button>
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      <Status kind="done">{withdrawn ? t('withdrawn') : null}</Status>
      <Status kind="trouble">{change.error === null ? null : sentence(change.error)}</Status>
    </>
  )
}
