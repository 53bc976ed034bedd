import type { RouteObject } from 'react-router-dom'

const load = () => import('./imports')

/** Bringing files in: a new guide, or an existing draft; then what was understood of them. */
export const importRoutes: RouteObject[] = [
  { path: '/bring', lazy: async () => ({ Component: (await load()).BringPage }) },
  { path: '/bring/:importId', lazy: async () => ({ Component: (await load()).UnderstoodPage }) },
  { path: '/drafts/:guideId/bring', lazy: async () => ({ Component: (await load()).BringPage }) },
]
