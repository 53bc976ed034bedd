import { useContext } from 'react'
import type { i18n } from 'i18next'
import { I18nContext } from 'react-i18next'
import { directionOf } from '../../../shared/lib/language/direction'
import { localeOf } from '../../lib/localeOf'
import { ownLanguage, useGuide } from './guideView'

const wordsIn = (instance: i18n) => {
  const { language } = instance
  return {
    t: instance.getFixedT(language, ['reading', 'guide']),
    language,
    number: (value: string | number) => formatNumber(value, language),
    date: (iso: string) => formatDate(iso, language),
    /** A label within a sentence that runs from right to left keeps its own direction (U+2068, U+2069). */
    isolated: (label: string) => (directionOf(language) === 'rtl' ? `\u2068${label}\u2069` : label),
  }
}
type Words = ReturnType<typeof wordsIn>

const made = new WeakMap<i18n, Words>()

/**
 * Sentences of the interface, numbers and dates in its language. Made once for a page: a page asks for them at every quantity, and the
 * library's own hook, which also listens for a change of language, takes most of the time of drawing it.
 * @throws outside of an I18nextProvider: a programmer's error.
 */
export function useWords(): Words {
  const instance = useContext(I18nContext)?.i18n
  if (instance === undefined) throw new Error('useWords is used outside of an I18nextProvider.')
  const known = made.get(instance)
  if (known?.language === instance.language) return known
  const words = wordsIn(instance)
  made.set(instance, words)
  return words
}

/** `lang` and `dir` for the guide's own words where the interface is in another language. */
export function useOwnLanguage(): { lang?: string; dir?: 'ltr' | 'rtl' } {
  return ownLanguage(useGuide().doc.lang, useWords().language)
}

const numberFormats = new Map<string, Intl.NumberFormat>()

/** A decimal with the digits that it was written with, in digits 0 to 9 in every language, as drawings have them. */
export function formatNumber(value: string | number, language: string): string {
  const text = String(value)
  const digits = text.split('.')[1]?.length ?? 0
  const key = `${language} ${digits}`
  let format = numberFormats.get(key)
  if (format === undefined) {
    format = new Intl.NumberFormat(localeOf(language), {
      numberingSystem: 'latn',
      minimumFractionDigits: digits,
      maximumFractionDigits: digits,
    })
    numberFormats.set(key, format)
  }
  return format.format(text as Intl.StringNumericLiteral)
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
