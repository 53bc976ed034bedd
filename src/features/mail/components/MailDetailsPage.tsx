import { useQuery } from '@tanstack/react-query'
import { useTranslation } from 'react-i18next'
import { Link } from 'react-router-dom'
import type { MailDetails } from '../../../../shared/api/mail'
import { directionOf } from '../../../../shared/lib/language/direction'
import { Busy } from '../../../components/controls/Busy'
import { Button } from '../../../components/controls/Button'
import { FormSection } from '../../../components/controls/FormSection'
import { Status } from '../../../components/controls/Status'
import { localeOf } from '../../../lib/localeOf'
import { useSentence } from '../../../lib/useSentence'
import { mailQuery, useSendAgain } from '../api/mails'
import { MailStateWord } from './MailStateWord'

/** One mail as it went: its head, its text, and the page that it carries, shut in a frame that can run and load nothing. */
export function MailDetailsPage({ mailId }: { mailId: string }) {
  const { t } = useTranslation('mail')
  const sentence = useSentence()
  const { data, error } = useQuery(mailQuery(mailId))
  return (
    <div className="sheet form-page">
      <p className="note">
        <Link to="/mail">{t('back')}</Link>
      </p>
      {error !== null && <Status kind="trouble">{sentence(error)}</Status>}
      {data === undefined ? error === null && <Busy /> : <Mail mail={data} />}
    </div>
  )
}

function Mail({ mail }: { mail: MailDetails }) {
  const { t } = useTranslation('mail')
  const direction = directionOf(mail.language)
  return (
    <>
      <title>{`${mail.subject} · ${t('shell:name')}`}</title>
      <h1 className="t3">
        <bdi>{mail.subject}</bdi>
      </h1>
      <FormSection title={t('state')} wide>
        <MailHead mail={mail} />
      </FormSection>
      <FormSection title={t('text')} wide>
        <pre className="mail-text" dir={direction} lang={mail.language}>
          {mail.text}
        </pre>
      </FormSection>
      <FormSection title={t('html')} wide>
        <iframe className="mail-page" title={t('htmlTitle')} sandbox="" srcDoc={mail.html} />
      </FormSection>
    </>
  )
}

function MailHead({ mail }: { mail: MailDetails }) {
  const { t, i18n } = useTranslation('mail')
  const sentence = useSentence()
  const again = useSendAgain(mail.id)
  const when = new Intl.DateTimeFormat(localeOf(i18n.language), { dateStyle: 'long', timeStyle: 'short' })
  const rows: [string, string][] = [
    [t('recipient'), mail.recipient],
    [t('written'), when.format(new Date(mail.createdAt))],
    ...(mail.sentAt === null
      ? []
      : ([[t('sentAt'), when.format(new Date(mail.sentAt))]] as [string, string][])),
    [t('attempts'), String(mail.attempts)],
    ...(mail.error === null ? [] : ([[t('error'), mail.error]] as [string, string][])),
  ]
  return (
    <>
      <table className="ledger">
        <tbody>
          <tr>
            <th scope="row">{t('state')}</th>
            <td>
              <MailStateWord state={mail.state} />
            </td>
          </tr>
          {rows.map(([name, value]) => (
            <tr key={name}>
              <th scope="row">{name}</th>
              <td>
                <bdi>{value}</bdi>
              </td>
            </tr>
          ))}
        </tbody>
      </table>
      {mail.state === 'refused' && (
        <>
          <p className="note">{t('againHint')}</p>
          <div className="actions">
            <Button kind="go" busy={again.isPending} onClick={() => again.mutate()}>
              {t('sendAgain')}
            </Button>
          </div>
        </>
      )}
      <Status kind="done">{again.isSuccess ? t('again') : null}</Status>
      <Status kind="trouble">{again.error === null ? null : sentence(again.error)}</Status>
    </>
  )
}
