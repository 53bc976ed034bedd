import { useEffect } from 'react'
import { useLocation } from 'react-router-dom'

/** In a navigation's state: a place of the page to focus that is not part of the address. */
export interface GoingTo {
  focus: string
}

/**
 * Goes to the node and field that the address names (`?node=…&field=…`): what a link of the readiness list points to. Parts of the
 * page mark themselves with `data-node` and `data-field`. The frame moves the focus to the text when the address changes, so this waits for the next frame.
 */
export function useGoToPlace(): void {
  const { search, key, state } = useLocation()
  useEffect(() => {
    const query = new URLSearchParams(search)
    const node = (state as GoingTo | null)?.focus ?? query.get('node')
    const field = query.get('field')
    if (node === null && field === null) return
    const timer = setTimeout(() => focusPlace(node, field), 60)
    return () => clearTimeout(timer)
  }, [search, key, state])
}

export function focusPlace(node: string | null, field: string | null): void {
  const within =
    node === null
      ? (document.querySelector('.draft-text') ?? document)
      : document.querySelector(`[data-node="${CSS.escape(node)}"]`)
  const byField = field === null ? null : within?.querySelector(`[data-field="${CSS.escape(field)}"]`)
  const place = byField ?? (node !== null && within instanceof Element ? within : null)
  if (!(place instanceof HTMLElement)) return
  const control = place.matches(CONTROLS) ? place : place.querySelector(CONTROLS)
  const target = control instanceof HTMLElement ? control : place
  if (control === null) place.tabIndex = -1
  target.focus({ preventScroll: true })
  place.scrollIntoView({ block: 'center' })
}

const CONTROLS = 'input:not([type=hidden]),textarea,select,[contenteditable=true],button,a[href]'
