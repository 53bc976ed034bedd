import type { Request } from 'express'
import type { z } from 'zod'
import { Problem } from './problem'

/** Deeper than any body of the interface goes: a guide with lists in lists in notes needs some thirty. */
const DEEPEST = 100
/** A form with everything wrong names the first fields; a person mends them one after the other. */
const MOST_ERRORS = 20

/** The body, by its contract. @throws Problem bad-request, naming every field that is wrong. */
export function parseBody<Schema extends z.ZodType>(schema: Schema, req: Request): z.output<Schema> {
  // Schemas that nest call themselves: without this a body of a million brackets would exhaust the stack.
  if (isDeeperThan(req.body, DEEPEST)) {
    throw new Problem('bad-request', {}, [{ path: [], message: 'This is nested too deeply.' }])
  }
  return parse(schema, req.body)
}

/** The query string, by its contract. */
export function parseQuery<Schema extends z.ZodType>(schema: Schema, req: Request): z.output<Schema> {
  return parse(schema, req.query)
}

function parse<Schema extends z.ZodType>(schema: Schema, value: unknown): z.output<Schema> {
  const parsed = schema.safeParse(value)
  if (parsed.success) return parsed.data
  throw new Problem(
    'bad-request',
    {},
    parsed.error.issues.slice(0, MOST_ERRORS).map((issue) => ({
      path: issue.path.map((part) => (typeof part === 'symbol' ? String(part) : part)),
      message: issue.message,
    })),
  )
}

function isDeeperThan(value: unknown, limit: number): boolean {
  let level: unknown[] = [value]
  for (let depth = 0; level.length > 0; depth += 1) {
    if (depth > limit) return true
    level = level.flatMap((item) => (item !== null && typeof item === 'object' ? Object.values(item) : []))
  }
  return false
}
