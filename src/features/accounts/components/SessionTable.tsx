import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import type { SessionEntry } from '../../../../shared/api/accounts'
import { Busy } from '../../../components/controls/Busy'
import { Button } from '../../../components/controls/Button'
import { Status } from '../../../components/controls/Status'
import { localeOf } from '../../../lib/localeOf'
import { useSentence } from '../../../lib/useSentence'
import { sessionsQuery, useEndSession } from '../api/sessions'

/** Where the account is open, each with the button that closes it. */
export function SessionTable() {
  const { t, i18n } = useTranslation('accounts')
  const sentence = useSentence()
  const { data, error } = useQuery(sessionsQuery)
  const end = useEndSession()
  const [ended, setEnded] = useState(false)
  const deviceOf = ({ browser, system }: SessionEntry): string =>
    browser !== null && system !== null
      ? t('account.deviceWords', { browser, system })
      : (browser ?? system ?? t('account.unknownDevice'))
  const when = new Intl.DateTimeFormat(localeOf(i18n.language), { dateStyle: 'medium', timeStyle: 'short' })
  const close = (id: string | null): void => {
    setEnded(false)
    end.mutate(id, { onSuccess: () => setEnded(true) })
  }
  if (error !== null) return <Status kind="trouble">{sentence(error)}</Status>
  if (data === undefined) return <Busy />
  const others = data.sessions.filter(({ current }) => !current)
  return (
    <>
      <p className="note">{t('account.devicesSide')}</p>
      <table className="ledger fold">
        <thead>
          <tr>
            <th>{t('account.device')}</th>
            <th>{t('account.used')}</th>
            <th>{t('account.since')}</th>
            <th>
              <span className="visually-hidden">{t('account.end')}</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {data.sessions.map((session) => (
            <tr key={session.id}>
              <td>
                {deviceOf(session)}
                {session.address !== null && (
                  <small>
                    <bdi>{session.address}</bdi>
                  </small>
                )}
              </td>
              <td data-l={t('account.used')}>{when.format(new Date(session.usedAt))}</td>
              <td data-l={t('account.since')}>{when.format(new Date(session.createdAt))}</td>
              <td className="act">
                {session.current ? (
                  <span className="lichen">{t('account.here')}</span>
                ) : (
                  <Button
                    kind="quiet"
                    disabled={end.isPending}
                    aria-label={t('account.endOf', { device: deviceOf(session) })}
                    onClick={() => close(session.id)}
                  >
                    {t('account.end')}
                  </Button>
                )}
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      {others.length > 0 && (
        <div className="actions">
          <Button busy={end.isPending} onClick={() => close(null)}>
            {t('account.endOthers')}
          </Button>
        </div>
      )}
      <Status kind="done">{ended ? t('account.ended') : null}</Status>
      <Status kind="trouble">{end.error === null ? null : sentence(end.error)}</Status>
    </>
  )
}
