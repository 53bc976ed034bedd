import { renderToString } from 'react-dom/server'
import { I18nextProvider } from 'react-i18next'
import type { RenderPage } from '../../shared/api/pages'
import { RunningHead } from '../components/reading/RunningHead'
import { createI18n } from '../lib/i18n'

/** Renders a reading page to HTML. Called by the server through its built file; nothing of it reaches the browser. */
export const renderPage: RenderPage = ({ language }) => ({
  html: renderToString(
    <I18nextProvider i18n={createI18n(language)}>
      <RunningHead current="library" />
    </I18nextProvider>,
  ),
})
