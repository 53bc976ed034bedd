import i18next, { type i18n, type Resource } from 'i18next'
import { directionOf } from '../../shared/lib/language/direction'

/** Languages of the interface; each has a sentence file per namespace in src/locales/<language>. */
export const LANGUAGES = ['en', 'ar'] as const
export type Language = (typeof LANGUAGES)[number]

const files = import.meta.glob<Record<string, unknown>>('../locales/*/*.json', {
  eager: true,
  import: 'default',
})

const resources: Resource = {}
for (const [path, sentences] of Object.entries(files)) {
  const [language, file] = path.split('/').slice(-2)
  resources[language!] = {
    ...resources[language!],
    [file!.replace('.json', '')]: sentences as Resource[string],
  }
}

/** An instance for one language: one per page on the server, one for the application in the browser. */
export function createI18n(language: string): i18n {
  const instance = i18next.createInstance()
  void instance.init({
    lng: language,
    fallbackLng: 'en',
    resources,
    defaultNS: 'shell',
    interpolation: { escapeValue: false },
    initAsync: false,
    returnNull: false,
  })
  return instance
}

export { directionOf }
