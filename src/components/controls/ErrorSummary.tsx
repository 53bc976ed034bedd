import { useEffect, useRef, type MouseEvent } from 'react'
import { useTranslation } from 'react-i18next'

export interface SummaryError {
  /** The id of the control to go to; none for an error of the whole form. */
  fieldId?: string
  /** The field's label, so that the sentence can be found again. */
  label?: string
  sentence: string
}

export interface ErrorSummaryProps {
  errors: readonly SummaryError[]
  /** Rises with each try to send the form: the summary takes the focus each time that it is still needed. */
  attempt: number
}

/** At the head of a form that could not be sent: every error, each a way to its field. Takes the focus. */
export function ErrorSummary({ errors, attempt }: ErrorSummaryProps) {
  const { t } = useTranslation('controls')
  const box = useRef<HTMLDivElement>(null)
  const any = errors.length > 0
  useEffect(() => {
    if (any && attempt > 0) box.current?.focus()
  }, [any, attempt])
  if (!any) return null
  return (
    <div className="error-summary" ref={box} tabIndex={-1} role="group" aria-labelledby="error-summary-title">
      <p className="font-semibold" id="error-summary-title">
        {t('mend', { count: errors.length })}
      </p>
      <ul>
        {errors.map((error) => (
          <li key={`${error.fieldId ?? ''} ${error.sentence}`}>
            {error.fieldId === undefined ? (
              error.sentence
            ) : (
              <a href={`#${error.fieldId}`} onClick={goTo(error.fieldId)}>
                {error.label === undefined ? error.sentence : `${error.label}: ${error.sentence}`}
              </a>
            )}
          </li>
        ))}
      </ul>
    </div>
  )
}

/** Focus as well as place: a link to a control only scrolls in some browsers. */
const goTo = (id: string) => (event: MouseEvent) => {
  const target = document.getElementById(id)
  if (target === null) return
  event.preventDefault()
  const control = target.matches('input,select,textarea,button')
    ? target
    : target.querySelector('input,button')
  if (control instanceof HTMLElement) control.focus()
}
