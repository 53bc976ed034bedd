import type { z } from 'zod'
import { Problem } from './problem'

/** The place in a list where the next page begins, as text for an address. */
export const cursorOf = (place: unknown): string => Buffer.from(JSON.stringify(place)).toString('base64url')

/** What a cursor says, by its schema. @throws Problem bad-request for one that this site did not make. */
export function placeOf<Schema extends z.ZodType>(schema: Schema, cursor: string): z.output<Schema> {
  const parsed = schema.safeParse(readJson(Buffer.from(cursor, 'base64url').toString('utf8')))
  if (parsed.success) return parsed.data
  throw new Problem('bad-request', {}, [{ path: ['cursor'], message: 'Start at the first page again.' }])
}

function readJson(text: string): unknown {
  try {
    return JSON.parse(text)
  } catch (error) {
    if (error instanceof SyntaxError) return undefined
    throw error
  }
}
