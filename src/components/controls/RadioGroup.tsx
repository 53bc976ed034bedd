import { useId, type ComponentPropsWithRef, type ReactNode } from 'react'
import { FieldError, describedBy, isWrong, type FieldParts } from './Field'

export interface RadioOption {
  value: string
  label: ReactNode
  description?: ReactNode
  disabled?: boolean
}

export interface RadioGroupProps
  extends
    Omit<FieldParts, 'optional'>,
    Omit<
      ComponentPropsWithRef<'input'>,
      'children' | 'type' | 'value' | 'aria-describedby' | 'aria-invalid'
    > {
  options: readonly RadioOption[]
  /** The one that is chosen; leave it out for `register` of react-hook-form, which reads the inputs themselves. */
  value?: string
}

/** One of a few, all in view, each with a sentence where it needs one. Arrow keys move between them. */
export function RadioGroup({
  label,
  description,
  error,
  hideLabel,
  options,
  value,
  id: given,
  name,
  ...input
}: RadioGroupProps) {
  const made = useId()
  const id = given ?? made
  return (
    <fieldset
      className="field"
      {...describedBy(id, { label, description, error })}
      aria-invalid={undefined}
      data-wrong={isWrong(error) || undefined}
    >
      <legend className={hideLabel === true ? 'visually-hidden' : 'label'}>{label}</legend>
      {description !== undefined && (
        <p className="note" id={`${id}-description`}>
          {description}
        </p>
      )}
      {options.map((option) => (
        <RadioChoice
          key={option.value}
          id={`${id}-${option.value}`}
          option={option}
          input={{
            name: name ?? id,
            ...input,
            ...(value !== undefined && { checked: value === option.value }),
          }}
        />
      ))}
      <FieldError id={id} error={error} />
    </fieldset>
  )
}

function RadioChoice(props: { id: string; option: RadioOption; input: ComponentPropsWithRef<'input'> }) {
  const { id, option } = props
  return (
    <div className="choice">
      <input
        {...props.input}
        type="radio"
        value={option.value}
        disabled={option.disabled ?? props.input.disabled}
        {...describedBy(id, { label: '', description: option.description })}
      />
      <div>
        <label htmlFor={id}>{option.label}</label>
        {option.description !== undefined && (
          <p className="note" id={`${id}-description`}>
            {option.description}
          </p>
        )}
      </div>
    </div>
  )
}
