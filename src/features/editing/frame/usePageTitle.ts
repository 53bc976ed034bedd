import { useEffect } from 'react'

/** The page's title, from the smallest place to the site's name. */
export function usePageTitle(title: string): void {
  useEffect(() => {
    document.title = title === '' ? 'Quern' : `${title} · Quern`
  }, [title])
}
