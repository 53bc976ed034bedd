import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { NumberField, type NumberFieldProps } from '../../../components/controls/NumberField'
import { useDraft } from '../draftStore'
import { readDecimal } from './readDecimal'

export interface DecimalInputProps extends Omit<
  NumberFieldProps,
  'value' | 'onChange' | 'onBlur' | 'onFocus'
> {
  value: string | null
  /** Called with each valid number, and with null for an empty field. */
  onChange: (value: string | null) => void
  below0?: boolean
}

/** A decimal of the document. What is typed stays as typed; what is no number is said and not saved, and not lost either. */
export function DecimalInput({ value, onChange, below0 = false, error, ...rest }: DecimalInputProps) {
  const { t } = useTranslation('editing')
  const { readOnly } = useDraft()
  const [typed, setTyped] = useState<string | null>(null)
  const read = typed === null ? undefined : readDecimal(typed, { below0, whole: rest.whole === true })
  const wrong = read?.ok === false ? t(rest.whole === true ? 'field.notWhole' : 'field.notNumber') : error
  const change = (text: string): void => {
    setTyped(text)
    const now = readDecimal(text, { below0, whole: rest.whole === true })
    if (now.ok && now.value !== value) onChange(now.value)
  }
  // While the field is being typed in, the text is the person's; when the document changes otherwise (undo), it is the document's.
  const agrees = read?.ok === true && read.value === value
  return (
    <NumberField
      {...rest}
      error={wrong}
      readOnly={readOnly}
      value={typed !== null && (agrees || read?.ok === false) ? typed : (value ?? '')}
      onChange={(event) => change(event.target.value)}
      onBlur={() => agrees && setTyped(null)}
    />
  )
}
