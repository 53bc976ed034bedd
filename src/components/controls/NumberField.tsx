import { TextField, type TextFieldProps } from './TextField'

export interface NumberFieldProps extends Omit<TextFieldProps, 'type' | 'inputMode' | 'dir'> {
  /** Whole numbers only: the phone shows digits without a decimal mark. */
  whole?: boolean
}

/**
 * A number as text: exact decimals stay as they were typed ("0.30"), nothing is lost on the way through a float, and a wheel or
 * an arrow key does not change it by accident. The caller reads it with its own contract.
 */
export function NumberField({ whole = false, className, ...field }: NumberFieldProps) {
  return (
    <TextField
      autoComplete="off"
      {...field}
      className={['num', className].filter(Boolean).join(' ')}
      inputMode={whole ? 'numeric' : 'decimal'}
      dir="ltr"
    />
  )
}
