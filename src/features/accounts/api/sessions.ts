import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { z } from 'zod'
import { SessionList } from '../../../../shared/api/accounts'
import { request } from '../../../lib/request'

export const sessionsQuery = queryOptions({
  queryKey: ['account', 'sessions'],
  queryFn: ({ signal }) => request('/api/account/sessions', SessionList, { signal }),
})

/** Ends one session, or all others where no id is given. */
export function useEndSession() {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (id: string | null) =>
      request(id === null ? '/api/account/sessions' : `/api/account/sessions/${id}`, z.undefined(), {
        method: 'DELETE',
      }),
    onSettled: () => client.invalidateQueries({ queryKey: sessionsQuery.queryKey }),
  })
}
