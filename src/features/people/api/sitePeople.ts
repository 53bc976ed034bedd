import { infiniteQueryOptions, useMutation, useQueryClient } from '@tanstack/react-query'
import type { SiteRole } from '../../../../shared/access/ability'
import { SitePeople, SitePerson } from '../../../../shared/api/people'
import { request } from '../../../lib/request'

const PEOPLE = ['people'] as const

export const sitePeopleQuery = (search: string) =>
  infiniteQueryOptions({
    queryKey: [...PEOPLE, search],
    queryFn: ({ pageParam, signal }) => {
      const query = new URLSearchParams({ search, ...(pageParam !== null && { cursor: pageParam }) })
      return request(`/api/people?${query}`, SitePeople, { signal })
    },
    initialPageParam: null as string | null,
    getNextPageParam: (page) => page.next,
  })

export function useSetSiteRole() {
  const client = useQueryClient()
  return useMutation({
    mutationFn: ({ id, role }: { id: string; role: SiteRole }) =>
      request(`/api/people/${id}`, SitePerson, { method: 'PATCH', body: { role } }),
    onSettled: () => client.invalidateQueries({ queryKey: PEOPLE }),
  })
}
