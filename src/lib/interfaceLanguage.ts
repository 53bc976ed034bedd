import { LANGUAGES, type Language } from './i18n'

const COOKIE = 'quern_language'
const HOLDS_SECONDS = 365 * 24 * 3600

/** What this browser keeps under a name, if anything. */
export function readCookie(name: string): string | undefined {
  const found = document.cookie.split('; ').find((cookie) => cookie.startsWith(`${name}=`))
  return found === undefined ? undefined : decodeURIComponent(found.slice(name.length + 1))
}

/** The language that was chosen on this device or in the account; else the one that the page came in. */
export function interfaceLanguage(): string {
  const chosen = readCookie(COOKIE)
  return LANGUAGES.find((language) => language === chosen) ?? document.documentElement.lang
}

/** Keeps the choice and draws the page anew in it. */
export function chooseLanguage(language: Language): void {
  document.cookie = `${COOKIE}=${language}; path=/; max-age=${HOLDS_SECONDS}; samesite=lax`
  location.reload()
}
