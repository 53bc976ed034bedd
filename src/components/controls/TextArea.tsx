import { useId, type ComponentPropsWithRef } from 'react'
import { Field, describedBy, isWrong, type FieldParts } from './Field'

export type TextAreaProps = FieldParts &
  Omit<ComponentPropsWithRef<'textarea'>, 'children' | 'aria-describedby' | 'aria-invalid'>

/** Several lines of plain text. Grows with what is written where the browser can. */
export function TextArea({
  label,
  description,
  error,
  optional,
  hideLabel,
  id: given,
  ...area
}: TextAreaProps) {
  const made = useId()
  const id = given ?? made
  const parts = { label, description, error, optional, hideLabel }
  return (
    <Field id={id} {...parts}>
      <div className={isWrong(error) ? 'input err' : 'input'}>
        <textarea rows={3} {...area} {...describedBy(id, parts)} />
      </div>
    </Field>
  )
}
