import { infiniteQueryOptions, queryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import { MailDetails, MailPage, type MailState } from '../../../../shared/api/mail'
import { request } from '../../../lib/request'

const MAILS = ['mails'] as const

export const mailsQuery = (state: MailState | 'all') =>
  infiniteQueryOptions({
    queryKey: [...MAILS, 'list', state],
    queryFn: ({ pageParam, signal }) => {
      const query = new URLSearchParams({
        ...(state !== 'all' && { state }),
        ...(pageParam !== null && { cursor: pageParam }),
      })
      return request(`/api/mails?${query}`, MailPage, { signal })
    },
    initialPageParam: null as string | null,
    getNextPageParam: (page) => page.next,
  })

export const mailQuery = (mailId: string) =>
  queryOptions({
    queryKey: [...MAILS, 'one', mailId],
    queryFn: ({ signal }) => request(`/api/mails/${mailId}`, MailDetails, { signal }),
  })

export function useSendAgain(mailId: string) {
  const client = useQueryClient()
  return useMutation({
    mutationFn: () => request(`/api/mails/${mailId}/send-again`, MailDetails, { method: 'POST' }),
    onSettled: () => client.invalidateQueries({ queryKey: MAILS }),
  })
}
