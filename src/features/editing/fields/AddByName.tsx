import { useState, type KeyboardEvent, type ReactNode } from 'react'
import { Combobox } from '../../../components/controls/Combobox'

export interface AddByNameProps {
  label: string
  hideLabel?: boolean
  placeholder?: string
  description?: string
  items: readonly { id: string; text: string; content?: ReactNode }[]
  onChoose: (id: string) => void
  /** What the last entry of the list says for words that are in no item: "New line “belt”". Left out where nothing new may come. */
  newSays?: (text: string) => string
  onNew?: (text: string) => void
}

const NEW = 'new'

/** Adds one of many, found by typing, or a new one of that name. The field empties itself, ready for the next. */
export function AddByName({ items, onChoose, newSays, onNew, ...field }: AddByNameProps) {
  const [text, setText] = useState('')
  const words = text.trim().toLocaleLowerCase()
  const found = items.filter((item) => item.text.toLocaleLowerCase().includes(words))
  const exact = items.find((item) => item.text.toLocaleLowerCase() === words)
  const canBeNew = newSays !== undefined && words !== '' && exact === undefined
  const choices = canBeNew ? [...found, { id: NEW, text: text.trim(), content: newSays(text.trim()) }] : found
  const choose = (id: string | null): void => {
    if (id === null) return
    const typed = text.trim()
    setText('')
    if (id === NEW) onNew?.(typed)
    else onChoose(id)
  }
  // Enter on what was typed, without going through the list: the item of that name, else the only one, else a new one.
  const onKeyDown = (event: KeyboardEvent<HTMLDivElement>): void => {
    if (event.key !== 'Enter' || words === '' || !(event.target instanceof HTMLInputElement)) return
    if (event.target.getAttribute('aria-activedescendant') !== null) return
    event.preventDefault()
    event.stopPropagation()
    choose(exact?.id ?? (found.length === 1 ? found[0]!.id : canBeNew ? NEW : null))
  }
  return (
    <div onKeyDownCapture={onKeyDown}>
      <Combobox {...field} items={choices} value={null} onChange={choose} text={text} onText={setText} />
    </div>
  )
}
