import { useEffect, useState } from 'react'

/** The colours that the 3D view takes from the page, so that it follows the theme. */
export interface Ink {
  ink: string
  stone: string
  paper: string
}

/** Reads the tokens, and again when the theme changes. */
export function useInk(): Ink {
  const [ink, setInk] = useState(readInk)
  useEffect(() => {
    const again = (): void => setInk(readInk())
    const dark = matchMedia('(prefers-color-scheme: dark)')
    const attributes = new MutationObserver(again)
    attributes.observe(document.documentElement, { attributeFilter: ['data-theme'] })
    dark.addEventListener('change', again)
    return () => {
      attributes.disconnect()
      dark.removeEventListener('change', again)
    }
  }, [])
  return ink
}

function readInk(): Ink {
  const style = getComputedStyle(document.documentElement)
  const token = (name: string): string => style.getPropertyValue(name).trim()
  return { ink: token('--ink'), stone: token('--stone'), paper: token('--paper') }
}
