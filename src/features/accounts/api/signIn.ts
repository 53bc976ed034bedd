import { queryOptions } from '@tanstack/react-query'
import { z } from 'zod'
import {
  Account,
  DemoAccounts,
  MailAsked,
  type AskForMail,
  type SignIn,
  type SignUp,
} from '../../../../shared/api/accounts'
import { request } from '../../../lib/request'

const post = <Schema extends z.ZodType>(path: string, schema: Schema, body: unknown) =>
  request(path, schema, { method: 'POST', body })

export const signUp = (body: SignUp) => post('/api/accounts', MailAsked, body)
export const askConfirmation = (email: string) => post('/api/accounts/confirmation', MailAsked, { email })
export const confirmAddress = (token: string) =>
  post('/api/accounts/confirmed', z.object({ signedIn: z.boolean() }), { token })

export const signIn = (body: SignIn) => post('/api/sessions', Account, body)
export const askLink = (body: AskForMail) => post('/api/sessions/link', MailAsked, body)
export const signInByLink = (token: string) => post('/api/sessions/by-link', Account, { token })
export const signOut = () => request('/api/sessions/current', z.undefined(), { method: 'DELETE' })

export const askReset = (email: string) => post('/api/passwords/reset', MailAsked, { email })
export const resetPassword = (body: { token: string; password: string }) =>
  post('/api/passwords', z.undefined(), body)

/** The demo's accounts; none where the site is no demo. */
export const demoAccountsQuery = queryOptions({
  queryKey: ['demo', 'accounts'],
  queryFn: ({ signal }) => request('/api/demo/accounts', DemoAccounts, { signal }),
  staleTime: Number.POSITIVE_INFINITY,
})
