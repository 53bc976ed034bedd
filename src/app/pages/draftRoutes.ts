import type { RouteObject } from 'react-router-dom'

const load = () => import('./drafts')

/** The addresses of the drafting pages. They are loaded together when one of them is opened. */
export const draftRoutes: RouteObject[] = [
  { path: '/drafts', lazy: async () => ({ Component: (await load()).Drafts }) },
  {
    path: '/drafts/:guideId',
    lazy: async () => ({ Component: (await load()).Draft }),
    children: [
      { index: true, lazy: async () => ({ Component: (await load()).FirstPlace }) },
      { path: 'steps/:stepId', lazy: async () => ({ Component: (await load()).Step }) },
      { path: 'parts', lazy: async () => ({ Component: (await load()).Parts }) },
      { path: 'guide', lazy: async () => ({ Component: (await load()).Guide }) },
      { path: 'publish', lazy: async () => ({ Component: (await load()).Publish }) },
      { path: 'preview', lazy: async () => ({ Component: (await load()).Preview }) },
    ],
  },
]
