import type { Request } from 'express'
import type { z } from 'zod'
import { Problem } from './problem'

/** The body, by its contract. @throws Problem bad-request, naming every field that is wrong. */
export function parseBody<Schema extends z.ZodType>(schema: Schema, req: Request): z.output<Schema> {
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
    parsed.error.issues.map((issue) => ({
      path: issue.path.map((part) => (typeof part === 'symbol' ? String(part) : part)),
      message: issue.message,
    })),
  )
}
