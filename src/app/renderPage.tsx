import { renderToStaticMarkup } from 'react-dom/server'
import { I18nextProvider } from 'react-i18next'
import type { RenderPage } from '../../shared/api/pages'
import { PageDocument } from '../features/reading/PageDocument'
import { createI18n } from '../lib/i18n'

/** Renders a reading page. Called by the server through its built file; nothing of it reaches the browser, so nothing is marked for it. */
export const renderPage: RenderPage = (request) =>
  `<!doctype html>${renderToStaticMarkup(
    <I18nextProvider i18n={createI18n(request.language)}>
      <PageDocument request={request} />
    </I18nextProvider>,
  )}`
