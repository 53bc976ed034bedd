import { useId, type ComponentPropsWithRef } from 'react'
import { FieldError, describedBy, type FieldParts } from './Field'

export type CheckboxProps = Omit<FieldParts, 'optional'> &
  Omit<ComponentPropsWithRef<'input'>, 'children' | 'type' | 'aria-describedby' | 'aria-invalid'>

/** One thing that is so or not. The label says what is so when it is ticked. */
export function Checkbox({ label, description, error, hideLabel, id: given, ...input }: CheckboxProps) {
  const made = useId()
  const id = given ?? made
  return (
    <div className="field">
      <div className="choice">
        <input type="checkbox" {...input} {...describedBy(id, { label, description, error })} />
        <div>
          <label htmlFor={id} className={hideLabel === true ? 'visually-hidden' : undefined}>
            {label}
          </label>
          {description !== undefined && (
            <p className="note" id={`${id}-description`}>
              {description}
            </p>
          )}
        </div>
      </div>
      <FieldError id={id} error={error} />
    </div>
  )
}
