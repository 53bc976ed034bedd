import type { KeyboardEvent } from 'react'

/** Alt with the arrow up or down moves a row by one place; 0 for every other key. */
export function nudgeBy(event: KeyboardEvent): -1 | 0 | 1 {
  if (!event.altKey || event.ctrlKey || event.metaKey) return 0
  return event.key === 'ArrowUp' ? -1 : event.key === 'ArrowDown' ? 1 : 0
}
