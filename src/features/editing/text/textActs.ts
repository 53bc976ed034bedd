import { createContext } from 'react'
import type { Condition } from '../../../../shared/guide/schema'

/** What pieces within the text ask of the editor round them. `when` is the step's condition. */
export interface TextActs {
  changeQuantity: (pos: number, anchor: Element) => void
  when: Condition | undefined
}

export const TextActsContext = createContext<TextActs | null>(null)
