import { useQuery } from '@tanstack/react-query'
import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { Link } from 'react-router-dom'
import type { Invitation } from '../../../../shared/api/people'
import { Busy } from '../../../components/controls/Busy'
import { Button } from '../../../components/controls/Button'
import { Status } from '../../../components/controls/Status'
import { useSentence } from '../../../lib/useSentence'
import { acceptInvitation, invitationQuery } from '../api/invitation'
import { useRoleWords } from './roleWords'

/** Opens from the mail. Whoever has no account makes one on the way; another address than the invited one is asked about. */
export function InvitationPage({ token, ownEmail }: { token: string; ownEmail: string | null }) {
  const { t } = useTranslation('people')
  const sentence = useSentence()
  const { data, error } = useQuery(invitationQuery(token))
  return (
    <div className="sheet form-page">
      <title>{`${t('accept.title')} · ${t('shell:name')}`}</title>
      <h1 className="t4">{t('accept.title')}</h1>
      <div className="narrow stack">
        {error !== null && <Status kind="trouble">{sentence(error)}</Status>}
        {data === undefined && error === null && <Busy />}
        {data === null && <Status kind="trouble">{t('accept.unknown')}</Status>}
        {data !== undefined && data !== null && (
          <WhatFor invitation={data} token={token} ownEmail={ownEmail} />
        )}
      </div>
    </div>
  )
}

function WhatFor(props: { invitation: Invitation; token: string; ownEmail: string | null }) {
  const { t } = useTranslation('people')
  const roleWords = useRoleWords()
  const { invitation, token, ownEmail } = props
  const { guideTitle: guide, invitedBy: inviter } = invitation
  return (
    <>
      <p>{inviter === null ? t('accept.textAlone', { guide }) : t('accept.text', { inviter, guide })}</p>
      <div>
        <p>{t('accept.as', { role: roleWords(invitation) })}</p>
        <p className="note">{t(`may.${invitation.role}`)}</p>
      </div>
      {invitation.state !== 'open' && <Status kind="trouble">{t(`accept.${invitation.state}`)}</Status>}
      {invitation.state === 'open' && ownEmail === null && (
        <SignInFirst token={token} email={invitation.email} />
      )}
      {invitation.state === 'open' && ownEmail !== null && (
        <Accept token={token} invited={invitation.email} yours={ownEmail} />
      )}
    </>
  )
}

function SignInFirst({ token, email }: { token: string; email: string }) {
  const { t } = useTranslation('people')
  const query = new URLSearchParams({ email, next: `/invitations/${token}` }).toString()
  return (
    <>
      <p className="note">
        {t('accept.needed', { email })} {t('accept.comeBack')}
      </p>
      <div className="actions">
        <Link className="button go" to={`/sign-in?${query}`}>
          {t('accept.signIn')}
        </Link>
        <Link className="button" to={`/sign-up?${query}`}>
          {t('accept.signUp')}
        </Link>
      </div>
    </>
  )
}

function Accept({ token, invited, yours }: { token: string; invited: string; yours: string }) {
  const { t } = useTranslation('people')
  const sentence = useSentence()
  const [busy, setBusy] = useState(false)
  const [trouble, setTrouble] = useState<string | null>(null)
  const other = invited !== yours
  const accept = async (): Promise<void> => {
    setBusy(true)
    setTrouble(null)
    try {
      const { guideId } = await acceptInvitation(token, other)
      location.assign(`/drafts/${guideId}`)
    } catch (error) {
      setTrouble(sentence(error))
      setBusy(false)
    }
  }
  return (
    <>
      {other && <Status>{t('accept.other', { invited, yours })}</Status>}
      <div className="actions">
        <Button kind="go" busy={busy} onClick={() => void accept()}>
          {other ? t('accept.otherSubmit', { yours }) : t('accept.submit')}
        </Button>
        {other && (
          <Link
            className="button"
            to={`/sign-in?${new URLSearchParams({ email: invited, next: `/invitations/${token}` })}`}
          >
            {t('accept.otherSignIn')}
          </Link>
        )}
      </div>
      <Status kind="trouble">{trouble}</Status>
    </>
  )
}
