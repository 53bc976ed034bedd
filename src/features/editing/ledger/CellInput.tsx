import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { LineKind, type Line } from '../../../../shared/guide/schema'
import { unitCodes } from '../../../../shared/lib/units/units'
import { unitFor } from '../../../../shared/lib/units/unitFor'
import { useDraft } from '../draftStore'
import { useUnitWord } from '../fields/useUnitWord'
import type { Column, KindWords } from './columns'

export interface CellInputProps {
  column: Column
  line: Line
  kinds: KindWords
  /** What it begins with. */
  text: string
  onWrite: (text: string) => void
  onTake: (text: string) => void
  errorId?: string
}

/** What a cell becomes while it is written in. */
export function CellInput({ column, line, kinds, text: begun, onWrite, onTake, errorId }: CellInputProps) {
  const { t } = useTranslation('editingLedger')
  const { document } = useDraft()
  const word = useUnitWord()
  const [text, setText] = useState(begun)
  const write = (now: string): void => {
    setText(now)
    onWrite(now)
  }
  const common = {
    ref: beginWriting,
    'aria-label': t(`column.${column}`),
    'aria-invalid': errorId === undefined ? undefined : (true as const),
    'aria-describedby': errorId,
  }
  if (column === 'kind' || column === 'unit' || (column === 'model' && line.kind === 'printed')) {
    const options = optionsOf(column)
    const value =
      column === 'unit'
        ? (unitFor(text) ?? '')
        : (options.find((option) => same(option.label, text))?.value ?? '')
    return (
      <select {...common} value={value} onChange={(event) => onTake(event.target.value)}>
        {(column === 'model' || value === '') && (
          <option value="">{column === 'model' ? t('noModel') : ''}</option>
        )}
        {options.map((option) => (
          <option key={option.value} value={option.value}>
            {option.label}
          </option>
        ))}
      </select>
    )
  }
  if (column === 'specification' || column === 'note') {
    return (
      <textarea
        {...common}
        rows={3}
        dir="auto"
        lang={document.lang}
        value={text}
        onChange={(event) => write(event.target.value)}
      />
    )
  }
  const words = column === 'name' || column === 'designation'
  return (
    <input
      {...common}
      type="text"
      dir="auto"
      lang={words ? document.lang : undefined}
      inputMode={column === 'spare' ? 'decimal' : undefined}
      value={text}
      onChange={(event) => write(event.target.value)}
    />
  )

  function optionsOf(list: 'kind' | 'unit' | 'model'): { value: string; label: string }[] {
    if (list === 'kind') return LineKind.options.map((kind) => ({ value: kind, label: kinds[kind] }))
    if (list === 'unit') return unitCodes.map((code) => ({ value: code, label: word(code) }))
    return document.models.map(({ id, name }) => ({ value: id, label: name }))
  }
}

/** The first letter typed chooses, as a list of the browser's own does. */
const same = (label: string, text: string): boolean =>
  text !== '' && label.toLocaleLowerCase().startsWith(text.toLocaleLowerCase())

/** At the end of what is there, so that one goes on writing. */
function beginWriting(element: HTMLElement | null): void {
  element?.focus({ preventScroll: true })
  if (element instanceof HTMLInputElement || element instanceof HTMLTextAreaElement)
    element.setSelectionRange(element.value.length, element.value.length)
}
