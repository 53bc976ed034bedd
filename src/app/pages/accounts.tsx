import { useQuery } from '@tanstack/react-query'
import { useParams } from 'react-router-dom'
import type { Account } from '../../../shared/api/accounts'
import { accountQuery } from '../../features/accounts/api/account'
import { AccountPage } from '../../features/accounts/components/AccountPage'
import { LeavePage } from '../../features/accounts/components/LeavePage'
import { MailDetailsPage } from '../../features/mail/components/MailDetailsPage'
import { MailListPage } from '../../features/mail/components/MailListPage'
import { GuidePeoplePage } from '../../features/people/components/GuidePeoplePage'
import { InvitationPage } from '../../features/people/components/InvitationPage'
import { SitePeoplePage } from '../../features/people/components/SitePeoplePage'
import { NotFound } from '../notFound'

/** Who is signed in; the frame lets nobody else through to these pages. */
function useAccount(): Account | null {
  return useQuery(accountQuery).data ?? null
}

export function OwnAccount() {
  const account = useAccount()
  return account === null ? null : <AccountPage account={account} />
}

export function Leave() {
  const account = useAccount()
  return account === null ? null : <LeavePage account={account} />
}

export function GuidePeople() {
  const { guideId = '' } = useParams()
  return <GuidePeoplePage key={guideId} guideId={guideId} ownId={useAccount()?.id ?? ''} />
}

export function Invitation() {
  const { token = '' } = useParams()
  const { data: account } = useQuery(accountQuery)
  return account === undefined ? null : <InvitationPage token={token} ownEmail={account?.email ?? null} />
}

/** The site asks for the role again with every request; this only spares others a page of refusals. */
export function SitePeople() {
  const account = useAccount()
  return account?.role === 'curator' ? <SitePeoplePage ownId={account.id} /> : <NotFound />
}

export function Mails() {
  return useAccount()?.role === 'curator' ? <MailListPage /> : <NotFound />
}

export function Mail() {
  const { mailId = '' } = useParams()
  return useAccount()?.role === 'curator' ? <MailDetailsPage mailId={mailId} /> : <NotFound />
}
