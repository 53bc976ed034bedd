import { useId, type ComponentPropsWithRef } from 'react'
import { Field, describedBy, isWrong, type FieldParts } from './Field'

export interface TextFieldProps
  extends FieldParts, Omit<ComponentPropsWithRef<'input'>, 'children' | 'aria-describedby' | 'aria-invalid'> {
  /** Set small at the end of the box: a unit of measure, a currency. */
  unit?: string
}

/** One line of text. Takes what an `input` takes, so that `{...register('name')}` of react-hook-form fits. */
export function TextField({
  label,
  description,
  error,
  optional,
  hideLabel,
  unit,
  id: given,
  className,
  ...input
}: TextFieldProps) {
  const made = useId()
  const id = given ?? made
  const parts = { label, description, error, optional, hideLabel }
  return (
    <Field id={id} {...parts}>
      <div className={['input', isWrong(error) && 'err', className].filter(Boolean).join(' ')}>
        <input type="text" {...input} {...describedBy(id, parts)} />
        {unit !== undefined && <span className="unit">{unit}</span>}
      </div>
    </Field>
  )
}
