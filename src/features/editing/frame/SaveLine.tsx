import { useEffect, useRef, useState } from 'react'
import { useTranslation } from 'react-i18next'
import { useSentence } from '../../../lib/useSentence'
import { useDraft } from '../draftStore'
import type { DraftView } from '../state/draftSession'
import { useOpenDraft } from './sessionContext'
import { localeOf } from '../../../lib/localeOf'

/** How the draft stands: kept when, on its way, not sent and why; and who else is here. */
export function SaveLine() {
  const { t, i18n } = useTranslation('editing')
  const { numbers } = useDraft()
  const { view } = useOpenDraft()
  const { words, trouble } = useSaveWords(view)
  const spoken = useSpokenTrouble(trouble ? words : '', t('save.keptAgain'))
  const others = view.also.map(({ name, step }) => {
    const number = step === null ? undefined : numbers.step[step]
    return number === undefined ? t('save.here', { name }) : t('save.inStep', { name, number })
  })
  return (
    <p className="note save-line">
      {view.guide.latest !== null && (
        <>{t('save.after', { label: view.guide.latest.label }) + t('save.then')}</>
      )}
      <span className={trouble ? 'oxide' : undefined} data-save={view.save.is}>
        {words}
        {view.save.is === 'refused' && view.save.why === 'sign in' && (
          <>
            {' '}
            <a href="/sign-in" target="_blank" rel="noreferrer">
              {t('save.signIn')}
            </a>
          </>
        )}
      </span>
      {others.length > 0 && (
        <>{t('save.then') + new Intl.ListFormat(localeOf(i18n.language)).format(others)}</>
      )}
      <span className="visually-hidden" role="status">
        {spoken}
      </span>
    </p>
  )
}

function useSaveWords({ save, keptHere }: DraftView): { words: string; trouble: boolean } {
  const { t, i18n } = useTranslation('editing')
  const sentence = useSentence()
  const here = t(keptHere ? 'save.keptHere' : 'save.notKeptHere')
  switch (save.is) {
    case 'kept':
      return {
        words: save.at === null ? t('save.keptNow') : keptAt(save.at, localeOf(i18n.language), t),
        trouble: false,
      }
    case 'changed':
    case 'keeping':
      return { words: t('save.keeping'), trouble: false }
    case 'no network':
      return { words: `${t('save.noNetwork')} ${here}`, trouble: true }
    case 'refused':
      return {
        words: `${save.why === 'sign in' ? t('save.signedOut') : t('save.refused', { why: sentence(save.error) })} ${here}`,
        trouble: true,
      }
  }
}

/** The hour for today, the date for longer ago. */
function keptAt(at: string, language: string, t: (key: string, values: { at: string }) => string): string {
  const then = new Date(at)
  const today = then.toDateString() === new Date().toDateString()
  const format = new Intl.DateTimeFormat(language, today ? { timeStyle: 'short' } : { dateStyle: 'medium' })
  return t(today ? 'save.keptAt' : 'save.keptOn', { at: format.format(then) })
}

/** Trouble is spoken when it comes and when it is over; every ordinary save in silence. */
function useSpokenTrouble(trouble: string, over: string): string {
  const [spoken, setSpoken] = useState('')
  const before = useRef('')
  useEffect(() => {
    if (trouble !== before.current) setSpoken(trouble === '' ? over : trouble)
    before.current = trouble
  }, [trouble, over])
  return spoken
}
