import type { QueryClient } from '@tanstack/react-query'
import { createBrowserRouter } from 'react-router-dom'
import { Frame } from './frame'
import { NotFound } from './notFound'
import { PageTrouble } from './pageTrouble'
import { accountRoutes } from './pages/accountRoutes'
import { draftRoutes } from './pages/draftRoutes'
import { importRoutes } from './pages/importRoutes'
import { Waiting } from './waiting'

/** The application's addresses. Reading pages are documents of their own and are reached by whole loads. */
export function createRouter(_queryClient: QueryClient) {
  return createBrowserRouter([
    {
      element: <Frame />,
      errorElement: <PageTrouble />,
      hydrateFallbackElement: <Waiting />,
      children: [...accountRoutes, ...importRoutes, ...draftRoutes, { path: '*', element: <NotFound /> }],
    },
  ])
}
