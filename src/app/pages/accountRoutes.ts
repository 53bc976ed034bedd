import type { RouteObject } from 'react-router-dom'

const load = () => import('./accounts')
const loadSignIn = () => import('./signIn')

/** The addresses of signing in, of one's account, of people and of mails. */
export const accountRoutes: RouteObject[] = [
  { path: '/sign-in', lazy: async () => ({ Component: (await loadSignIn()).SignInPage }) },
  { path: '/sign-in/link', lazy: async () => ({ Component: (await loadSignIn()).LinkPage }) },
  { path: '/sign-up', lazy: async () => ({ Component: (await loadSignIn()).SignUpPage }) },
  { path: '/confirm', lazy: async () => ({ Component: (await loadSignIn()).ConfirmPage }) },
  { path: '/reset', lazy: async () => ({ Component: (await loadSignIn()).ResetPage }) },
  { path: '/invitations/:token', lazy: async () => ({ Component: (await load()).Invitation }) },
  { path: '/account', lazy: async () => ({ Component: (await load()).OwnAccount }) },
  { path: '/account/leave', lazy: async () => ({ Component: (await load()).Leave }) },
  { path: '/drafts/:guideId/people', lazy: async () => ({ Component: (await load()).GuidePeople }) },
  { path: '/people', lazy: async () => ({ Component: (await load()).SitePeople }) },
  { path: '/mail', lazy: async () => ({ Component: (await load()).Mails }) },
  { path: '/mail/:mailId', lazy: async () => ({ Component: (await load()).Mail }) },
]
