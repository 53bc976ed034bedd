import { useInfiniteQuery } from '@tanstack/react-query'
import { useTranslation } from 'react-i18next'
import { Link, useSearchParams } from 'react-router-dom'
import { MAIL_STATES, type MailEntry, type MailState } from '../../../../shared/api/mail'
import { Busy } from '../../../components/controls/Busy'
import { Button } from '../../../components/controls/Button'
import { EmptyState } from '../../../components/controls/EmptyState'
import { Status } from '../../../components/controls/Status'
import { localeOf } from '../../../lib/localeOf'
import { useSentence } from '../../../lib/useSentence'
import { mailsQuery } from '../api/mails'
import { MailStateWord } from './MailStateWord'

/** Every mail that the site wrote, newest first, for curators. */
export function MailListPage() {
  const { t } = useTranslation('mail')
  const sentence = useSentence()
  const [params] = useSearchParams()
  const state: MailState | 'all' = MAIL_STATES.find((each) => each === params.get('state')) ?? 'all'
  const { data, error, hasNextPage, isFetchingNextPage, fetchNextPage } = useInfiniteQuery(mailsQuery(state))
  const mails = data?.pages.flatMap((page) => page.mails)
  const toServer = data?.pages[0]?.toServer
  return (
    <div className="sheet form-page">
      <title>{`${t('title')} · ${t('shell:name')}`}</title>
      <h1 className="t4">{t('title')}</h1>
      {toServer !== undefined && <p className="note narrow">{toServer ? t('toServer') : t('toFolder')}</p>}
      <nav className="tabs mb-6" aria-label={t('state')}>
        {(['all', ...MAIL_STATES] as const).map((each) => (
          <Link
            key={each}
            to={each === 'all' ? '/mail' : `/mail?state=${each}`}
            aria-current={each === state ? 'page' : undefined}
          >
            {t(`states.${each}`)}
          </Link>
        ))}
      </nav>
      {error !== null && <Status kind="trouble">{sentence(error)}</Status>}
      {mails === undefined && error === null && <Busy />}
      {mails?.length === 0 && <EmptyState>{t('none')}</EmptyState>}
      {mails !== undefined && mails.length > 0 && <MailTable mails={mails} />}
      {hasNextPage && (
        <div className="actions mt-4">
          <Button busy={isFetchingNextPage} onClick={() => void fetchNextPage()}>
            {t('more')}
          </Button>
        </div>
      )}
    </div>
  )
}

function MailTable({ mails }: { mails: MailEntry[] }) {
  const { t, i18n } = useTranslation('mail')
  const when = new Intl.DateTimeFormat(localeOf(i18n.language), { dateStyle: 'medium', timeStyle: 'short' })
  return (
    <table className="ledger fold">
      <thead>
        <tr>
          <th>{t('subject')}</th>
          <th>{t('recipient')}</th>
          <th>{t('state')}</th>
          <th className="r">{t('attempts')}</th>
          <th className="r">{t('written')}</th>
        </tr>
      </thead>
      <tbody>
        {mails.map((mail) => (
          <tr key={mail.id}>
            <td>
              <Link className="name" to={`/mail/${mail.id}`}>
                <bdi>{mail.subject}</bdi>
              </Link>
              {mail.error !== null && <small className="oxide">{mail.error}</small>}
            </td>
            <td>
              <bdi>{mail.recipient}</bdi>
            </td>
            <td>
              <MailStateWord state={mail.state} />
            </td>
            <td className="r" data-l={t('attempts')}>
              {mail.attempts}
            </td>
            <td className="r" data-l={t('written')}>
              {when.format(new Date(mail.createdAt))}
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  )
}
