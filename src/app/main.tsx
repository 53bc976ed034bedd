import { StrictMode } from 'react'
import { createRoot } from 'react-dom/client'
import { QueryClientProvider } from '@tanstack/react-query'
import { I18nextProvider } from 'react-i18next'
import { RouterProvider } from 'react-router-dom'
import { I18nProvider } from 'react-aria-components'
import { createI18n, directionOf } from '../lib/i18n'
import { interfaceLanguage } from '../lib/interfaceLanguage'
import { createQueryClient } from '../lib/queryClient'
import { createRouter } from './router'

const language = interfaceLanguage()
document.documentElement.lang = language
document.documentElement.dir = directionOf(language)
const queryClient = createQueryClient()
const root = document.getElementById('app')
if (root === null) throw new Error('The shell has no place for the application.')
createRoot(root).render(
  <StrictMode>
    <I18nextProvider i18n={createI18n(language)}>
      <I18nProvider locale={language}>
        <QueryClientProvider client={queryClient}>
          <RouterProvider router={createRouter(queryClient)} />
        </QueryClientProvider>
      </I18nProvider>
    </I18nextProvider>
  </StrictMode>,
)
