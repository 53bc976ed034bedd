import { queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { z } from 'zod'
import {
  Account,
  Leaving,
  MailAsked,
  type ChangeAccount,
  type DeleteAccount,
} from '../../../../shared/api/accounts'
import { readCookie } from '../../../lib/interfaceLanguage'
import { RequestProblem, request } from '../../../lib/request'

/** Who is signed in; null for nobody. Without the name that the site leaves in a cookie nobody is, and nothing is asked. */
export const accountQuery = queryOptions({
  queryKey: ['account'],
  queryFn: async ({ signal }) => {
    if (readCookie('quern_name') === undefined) return null
    try {
      return await request('/api/account', Account, { signal })
    } catch (error) {
      if (error instanceof RequestProblem && error.kind === 'not-signed-in') return null
      throw error
    }
  },
  staleTime: 60_000,
})

/** Changes name or language, and what is known of the account with it. */
export function useChangeAccount() {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (change: z.input<typeof ChangeAccount>) =>
      request('/api/account', Account, { method: 'PATCH', body: change }),
    onSuccess: (account) => client.setQueryData(accountQuery.queryKey, account),
  })
}

export function useChangePassword() {
  const client = useQueryClient()
  return useMutation({
    mutationFn: (body: { current: string; password: string }) =>
      request('/api/account/password', Account, { method: 'PUT', body }),
    onSuccess: (account) => client.setQueryData(accountQuery.queryKey, account),
  })
}

export const changeEmail = (email: string) =>
  request('/api/account/email', MailAsked, { method: 'POST', body: { email } })

export const leavingQuery = queryOptions({
  queryKey: ['account', 'leaving'],
  queryFn: ({ signal }) => request('/api/account/leaving', Leaving, { signal }),
  staleTime: 0,
})

export const deleteAccount = (body: DeleteAccount) =>
  request('/api/account/deletion', z.undefined(), { method: 'POST', body })
