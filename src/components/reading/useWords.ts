import { useTranslation } from 'react-i18next'
import { localeOf } from '../../lib/localeOf'
import { ownLanguage, useGuide } from './guideView'

/** Sentences of the interface, numbers and dates in its language, and the attributes of the guide's own words. */
export function useWords() {
  const { t, i18n } = useTranslation(['reading', 'guide'])
  const language = i18n.language
  return {
    t,
    language,
    number: (value: string | number) => formatNumber(value, language),
    date: (iso: string) => formatDate(iso, language),
  }
}

export function useOwnLanguage(): { lang?: string; dir?: 'ltr' | 'rtl' } {
  const { i18n } = useTranslation()
  return ownLanguage(useGuide().doc.lang, i18n.language)
}

/** A decimal with the digits that it was written with, in digits 0 to 9 in every language, as drawings have them. */
export function formatNumber(value: string | number, language: string): string {
  const text = String(value)
  const digits = text.split('.')[1]?.length ?? 0
  return new Intl.NumberFormat(localeOf(language), {
    numberingSystem: 'latn',
    minimumFractionDigits: digits,
    maximumFractionDigits: digits,
  }).format(text as Intl.StringNumericLiteral)
}

export function formatDate(iso: string, language: string): string {
  return new Intl.DateTimeFormat(localeOf(language), {
    day: 'numeric',
    month: 'long',
    year: 'numeric',
    timeZone: 'UTC',
    numberingSystem: 'latn',
    calendar: 'gregory',
  }).format(new Date(iso))
}
