import { useId, type KeyboardEvent } from 'react'
import { directionOf } from '../../../../shared/lib/language/direction'
import { describedBy, Field, isWrong, type FieldParts } from '../../../components/controls/Field'
import { useDraft } from '../draftStore'

export interface GuideTextProps extends FieldParts {
  value: string
  onChange: (value: string) => void
  /** The field's name in the document, to which the readiness list can lead. */
  field?: string
  /** Several lines; else Enter ends the field. */
  lines?: boolean
  maxLength?: number
  placeholder?: string
  /** `plain` is set in the type of its surroundings on a ruled line, `boxed` as a control. */
  look?: 'plain' | 'boxed'
  className?: string
}

/** Words of the guide: in the guide's language and direction, as tall as what is written. */
export function GuideText(props: GuideTextProps) {
  const { value, onChange, field, lines = false, look = 'boxed', className, placeholder } = props
  const { document, readOnly } = useDraft()
  const id = useId()
  const change = (text: string): void => onChange(lines ? text : text.replace(/\s*[\r\n]+\s*/g, ' '))
  const onKeyDown = (event: KeyboardEvent<HTMLTextAreaElement>): void => {
    if (event.key !== 'Enter' || lines || event.nativeEvent.isComposing) return
    event.preventDefault()
  }
  const box = ['grows', look, isWrong(props.error) && 'err', className].filter(Boolean).join(' ')
  return (
    <Field id={id} {...props}>
      <div className={box} data-value={value === '' ? (placeholder ?? '') : value} data-field={field}>
        <textarea
          rows={1}
          lang={document.lang}
          dir={value === '' ? directionOf(document.lang) : 'auto'}
          value={value}
          placeholder={placeholder}
          maxLength={props.maxLength ?? (lines ? 4000 : 300)}
          readOnly={readOnly}
          onChange={(event) => change(event.target.value)}
          onKeyDown={onKeyDown}
          {...describedBy(id, props)}
        />
      </div>
    </Field>
  )
}
