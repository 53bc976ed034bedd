import { NextPath } from '../../../../shared/api/accounts'

/** Where a person was going before they had to sign in; a path of this site and no other. */
export const nextOf = (search: URLSearchParams): string => {
  const next = NextPath.safeParse(search.get('next'))
  return next.success ? next.data : '/drafts'
}

/** Goes on by a whole load: the language may be another one now, and the next page may be one for readers. */
export const goOn = (next: string): void => location.assign(next)

/** The same search again, for the way to another of these pages. */
export const withNext = (path: string, search: URLSearchParams): string => {
  const next = search.get('next')
  return next === null ? path : `${path}?${new URLSearchParams({ next })}`
}

const KEPT = 'quern.next'

/** Keeps where a person was going while they look into their mail; the link there opens in the same browser, mostly. */
export function keepNext(search: URLSearchParams): void {
  if (search.has('next')) localStorage.setItem(KEPT, nextOf(search))
}

/** Where a person was going before they signed up on this device, once. */
export function takeKeptNext(): string {
  const next = localStorage.getItem(KEPT)
  localStorage.removeItem(KEPT)
  return nextOf(new URLSearchParams(next === null ? {} : { next }))
}
