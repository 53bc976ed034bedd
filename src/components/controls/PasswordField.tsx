import { useId, useState, type ComponentPropsWithRef } from 'react'
import { useTranslation } from 'react-i18next'
import { Field, describedBy, isWrong, type FieldParts } from './Field'

export type PasswordFieldProps = FieldParts &
  Omit<ComponentPropsWithRef<'input'>, 'children' | 'type' | 'aria-describedby' | 'aria-invalid'>

/** A password, with a button that shows it: a typing error in what one cannot see costs more than a glance over the shoulder. */
export function PasswordField({
  label,
  description,
  error,
  optional,
  hideLabel,
  id: given,
  ...input
}: PasswordFieldProps) {
  const { t } = useTranslation('controls')
  const [shown, setShown] = useState(false)
  const made = useId()
  const id = given ?? made
  const parts = { label, description, error, optional, hideLabel }
  return (
    <Field id={id} {...parts}>
      <div className={isWrong(error) ? 'input err' : 'input'}>
        <input
          autoCapitalize="none"
          spellCheck={false}
          dir="ltr"
          {...input}
          type={shown ? 'text' : 'password'}
          {...describedBy(id, parts)}
        />
        <button
          type="button"
          className="in-field"
          aria-pressed={shown}
          aria-controls={id}
          onClick={() => setShown(!shown)}
        >
          {shown ? t('hide') : t('show')}
          <span className="visually-hidden"> {label}</span>
        </button>
      </div>
    </Field>
  )
}
