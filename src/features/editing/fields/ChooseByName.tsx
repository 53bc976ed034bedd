import { useState } from 'react'
import { Combobox, type ComboboxItem } from '../../../components/controls/Combobox'
import type { FieldParts } from '../../../components/controls/Field'

export interface ChooseByNameProps extends FieldParts {
  items: readonly ComboboxItem[]
  value: string
  onChange: (id: string) => void
  placeholder?: string
  disabled?: boolean
  /** Words that are no item's and may be chosen all the same: the id for them, or null. */
  ownFor?: (text: string) => ComboboxItem | null
}

const SHOWN = 60

/** One of many that stays chosen. What is typed narrows the list; leaving without choosing keeps what was there. */
export function ChooseByName({ items, value, onChange, ownFor, ...field }: ChooseByNameProps) {
  const [typed, setTyped] = useState<string | null>(null)
  const chosen = items.find((item) => item.id === value)
  const words = (typed ?? '').trim().toLocaleLowerCase()
  const found = items.filter((item) => item.text.toLocaleLowerCase().includes(words))
  const own =
    typed === null || found.some((item) => item.id === typed.trim()) ? null : (ownFor?.(typed.trim()) ?? null)
  const choose = (id: string | null): void => {
    if (id === null) return
    setTyped(null)
    if (id !== value) onChange(id)
  }
  return (
    <div onBlur={() => setTyped(null)}>
      <Combobox
        {...field}
        items={[...found.slice(0, SHOWN), ...(own === null ? [] : [own])]}
        value={null}
        onChange={choose}
        text={typed ?? chosen?.text ?? value}
        onText={(text) => setTyped(text === (chosen?.text ?? value) ? null : text)}
      />
    </div>
  )
}
