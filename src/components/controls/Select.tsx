import { useId, type ComponentPropsWithRef } from 'react'
import { Field, describedBy, isWrong, type FieldParts } from './Field'

export interface SelectOption {
  value: string
  label: string
  disabled?: boolean
}

export interface SelectProps
  extends
    FieldParts,
    Omit<ComponentPropsWithRef<'select'>, 'children' | 'aria-describedby' | 'aria-invalid'> {
  options: readonly SelectOption[]
}

/** One of a few. The browser's own list: it is the best one there is on a phone. For many to search through take Combobox. */
export function Select({
  label,
  description,
  error,
  optional,
  hideLabel,
  options,
  id: given,
  className,
  ...select
}: SelectProps) {
  const made = useId()
  const id = given ?? made
  const parts = { label, description, error, optional, hideLabel }
  return (
    <Field id={id} {...parts}>
      <div className={['input sel', isWrong(error) && 'err', className].filter(Boolean).join(' ')}>
        <select {...select} {...describedBy(id, parts)}>
          {options.map((option) => (
            <option key={option.value} value={option.value} disabled={option.disabled}>
              {option.label}
            </option>
          ))}
        </select>
      </div>
    </Field>
  )
}
