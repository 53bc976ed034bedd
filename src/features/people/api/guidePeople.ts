import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { z } from 'zod'
import { GuidePeople, type ChangeRole, type Invite } from '../../../../shared/api/people'
import { request } from '../../../lib/request'

const address = (guideId: string) => `/api/guides/${guideId}/people`

export const guidePeopleQuery = (guideId: string) =>
  queryOptions({
    queryKey: ['guides', guideId, 'people'],
    queryFn: ({ signal }) => request(address(guideId), GuidePeople, { signal }),
  })

export type PeopleChange =
  | { act: 'invite'; invite: Invite }
  | { act: 'withdraw'; invitationId: string }
  | { act: 'change'; userId: string; change: ChangeRole }
  | { act: 'remove'; userId: string }

/** Does one change to the people of a guide and reads them anew. */
export function useChangePeople(guideId: string) {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (change: PeopleChange) => send(guideId, change),
    onSettled: () => client.invalidateQueries({ queryKey: guidePeopleQuery(guideId).queryKey }),
  })
}

async function send(guideId: string, change: PeopleChange): Promise<void> {
  const invitations = `/api/guides/${guideId}/invitations`
  switch (change.act) {
    case 'invite':
      await request(invitations, GuidePeople, { method: 'POST', body: change.invite })
      return
    case 'withdraw':
      await request(`${invitations}/${change.invitationId}`, GuidePeople, { method: 'DELETE' })
      return
    case 'change':
      await request(`${address(guideId)}/${change.userId}`, z.undefined(), {
        method: 'PATCH',
        body: change.change,
      })
      return
    case 'remove':
      await request(`${address(guideId)}/${change.userId}`, z.undefined(), { method: 'DELETE' })
  }
}

export const leaveGuide = (guideId: string) =>
  request(`${address(guideId)}/me`, z.undefined(), { method: 'DELETE' })
