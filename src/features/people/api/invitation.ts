import { queryOptions } from '@tanstack/react-query'
import { AcceptedInvitation, Invitation } from '../../../../shared/api/people'
import { request, RequestProblem } from '../../../lib/request'

/** What an invitation is for; null where nobody handed it out. */
export const invitationQuery = (token: string) =>
  queryOptions({
    queryKey: ['invitation', token],
    queryFn: async ({ signal }) => {
      try {
        return await request('/api/invitations/read', Invitation, { method: 'POST', body: { token }, signal })
      } catch (error) {
        if (error instanceof RequestProblem && error.kind === 'not-found') return null
        throw error
      }
    },
  })

export const acceptInvitation = (token: string, otherAddress: boolean) =>
  request('/api/invitations/accept', AcceptedInvitation, { method: 'POST', body: { token, otherAddress } })
