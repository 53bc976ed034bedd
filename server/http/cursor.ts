import { Problem } from './problem'

/** A place in a list that is ordered by a time and, where times are equal, by an id. */
export interface Cursor {
  at: Date
  id: string
}

/** The place after which the next page begins, as text for an address: milliseconds, point, id. */
export const cursorOf = (row: { id: string; createdAt: Date } | Cursor): string =>
  `${('at' in row ? row.at : row.createdAt).getTime()}.${row.id}`

/** @throws Problem bad-request for a cursor that this site did not make. */
export function cursorFrom(cursor: string): Cursor {
  const [, at, id] = /^(\d{1,15})\.([\w-]{1,60})$/.exec(cursor) ?? []
  if (at === undefined || id === undefined) {
    throw new Problem('bad-request', {}, [{ path: ['cursor'], message: 'Start at the first page again.' }])
  }
  return { at: new Date(Number(at)), id }
}
