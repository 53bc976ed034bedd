import { useCallback } from 'react'
import { useTranslation } from 'react-i18next'
import { NoAnswer, RequestProblem } from './request'

/**
 * What to tell a person of an error, in the language of the interface. A refusal of the site has a sentence of its own; one that
 * has no translation keeps the site's English words, which still say what to do.
 */
export function useSentence(): (error: unknown) => string {
  const { t } = useTranslation('controls')
  return useCallback(
    (error) => {
      if (error instanceof RequestProblem) {
        return t(error.kind, {
          ...error.details.values,
          ns: 'problems',
          defaultValue: error.details.title,
          // A server's sentence may hold braces of its own; it is complete as it is.
          ...(error.details.values === undefined && { skipInterpolation: true }),
        })
      }
      return error instanceof NoAnswer ? t('noAnswer') : t('unexpected')
    },
    [t],
  )
}

/** The sentence of a contract about one field, translated. The English sentence is the key, since contracts are written in English. */
export function useFieldSentence(): (sentence: string) => string {
  const { t } = useTranslation('fields')
  return useCallback(
    (sentence) => t(sentence, { keySeparator: false, nsSeparator: false, defaultValue: sentence }),
    [t],
  )
}
