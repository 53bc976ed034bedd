import type { ReactNode } from 'react'
import { useTranslation } from 'react-i18next'

/** What every field has round its control. */
export interface FieldParts {
  label: ReactNode
  /** A sentence under the label: what is wanted, in which form. */
  description?: ReactNode
  /** What is wrong and what to do. Present means that the field is wrong. */
  error?: string
  /** Says behind the label that it may stay empty. */
  optional?: boolean
  /** The label is read out and not drawn: only where the place says plainly what the field is, as in a ledger's cell. */
  hideLabel?: boolean
}

/** Label, description, control and error, tied together by ids so that a screen reader reads them as one. */
export function Field({
  id,
  label,
  description,
  error,
  optional,
  hideLabel,
  children,
}: FieldParts & { id: string; children: ReactNode }) {
  return (
    <div className="field">
      <FieldLabel htmlFor={id} optional={optional} hide={hideLabel}>
        {label}
      </FieldLabel>
      {description !== undefined && (
        <p className="note" id={`${id}-description`}>
          {description}
        </p>
      )}
      {children}
      <FieldError id={id} error={error} />
    </div>
  )
}

function FieldLabel(props: { htmlFor: string; optional?: boolean; hide?: boolean; children: ReactNode }) {
  const { t } = useTranslation('controls')
  return (
    <label htmlFor={props.htmlFor} className={props.hide === true ? 'visually-hidden' : undefined}>
      {props.children}
      {props.optional === true && <span className="font-normal"> {t('optional')}</span>}
    </label>
  )
}

export function FieldError({ id, error }: { id: string; error?: string }) {
  if (error === undefined || error === '') return null
  return (
    <p className="field-error" id={`${id}-error`}>
      {error}
    </p>
  )
}

/** The attributes that tie a control to its field. */
export function describedBy(id: string, { description, error }: FieldParts) {
  const ids = [description !== undefined && `${id}-description`, isWrong(error) && `${id}-error`].filter(
    (part) => part !== false,
  )
  return {
    id,
    'aria-describedby': ids.length > 0 ? ids.join(' ') : undefined,
    'aria-invalid': isWrong(error) ? (true as const) : undefined,
  }
}

export const isWrong = (error: string | undefined): boolean => error !== undefined && error !== ''
