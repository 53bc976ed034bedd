import { z } from 'zod'

/** A BCP 47 language tag that `Intl` accepts, in its canonical form: "en", "ar", "pt-BR". */
export const LanguageTag = z
  .string()
  .max(35)
  .refine((tag) => {
    try {
      return Intl.getCanonicalLocales(tag).length === 1
    } catch (error) {
      if (error instanceof RangeError) return false
      throw error
    }
  }, 'Write a language tag such as en, ar or pt-BR.')

/** Scripts written from right to left, ISO 15924. */
const RIGHT_TO_LEFT = new Set(['Arab', 'Hebr', 'Syrc', 'Thaa', 'Nkoo', 'Adlm', 'Rohg', 'Mand', 'Samr'])

/**
 * The direction in which a language is written, from the script of its likely subtags. `Intl`'s own `textInfo` is not asked,
 * because engines answer differently. @throws RangeError for what is no language tag: ask `LanguageTag` first.
 */
export function directionOf(tag: string): 'ltr' | 'rtl' {
  const script = new Intl.Locale(tag).maximize().script
  return script !== undefined && RIGHT_TO_LEFT.has(script) ? 'rtl' : 'ltr'
}
