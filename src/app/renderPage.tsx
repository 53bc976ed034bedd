import type { i18n } from 'i18next'
import { renderToStaticMarkup } from 'react-dom/server'
import { I18nextProvider } from 'react-i18next'
import type { RenderPage } from '../../shared/api/pages'
import { PageDocument } from '../features/reading/PageDocument'
import { createI18n } from '../lib/i18n'

/** Nothing of an instance changes while a page is drawn, so one for each language serves all pages. */
const instances = new Map<string, i18n>()

function instanceFor(language: string): i18n {
  const instance = instances.get(language) ?? createI18n(language)
  instances.set(language, instance)
  return instance
}

/** Renders a reading page. Called by the server through its built file; nothing of it reaches the browser, so nothing is marked for it. */
export const renderPage: RenderPage = (request) =>
  `<!doctype html>${renderToStaticMarkup(
    <I18nextProvider i18n={instanceFor(request.language)}>
      <PageDocument request={request} />
    </I18nextProvider>,
  )}`
