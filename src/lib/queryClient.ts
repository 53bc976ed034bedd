import { QueryClient } from '@tanstack/react-query'
import { RequestProblem } from './request'

/** The application's cache. A refusal is final; only a missing answer is asked for again. */
export function createQueryClient(): QueryClient {
  return new QueryClient({
    defaultOptions: {
      queries: {
        staleTime: 10_000,
        retry: (count, error) => !(error instanceof RequestProblem) && count < 3,
      },
      mutations: { retry: false },
    },
  })
}
