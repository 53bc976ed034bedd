import type { z } from 'zod'
import { ProblemDetails } from '../../shared/api/problems'

/** A refusal by the server, with its sentence and the fields that are wrong. */
export class RequestProblem extends Error {
  constructor(readonly details: ProblemDetails) {
    super(details.title)
  }

  /** The last part of the problem's type: "stale", "not-ready". */
  get kind(): string {
    return this.details.type.split('/').at(-1) ?? ''
  }
}

/** There was no answer at all: no network, or the server is down. */
export class NoAnswer extends Error {}

interface Ask {
  method?: 'GET' | 'POST' | 'PUT' | 'PATCH' | 'DELETE'
  body?: unknown
  headers?: Record<string, string>
  signal?: AbortSignal
}

/**
 * Asks the server and reads its answer by the contract. @throws RequestProblem for a refusal, NoAnswer without network,
 * ZodError for an answer that breaks the contract.
 */
export async function request<Schema extends z.ZodType>(
  path: string,
  schema: Schema,
  ask: Ask = {},
): Promise<z.output<Schema>> {
  const response = await fetchAnswer(path, ask)
  const body: unknown = response.status === 204 ? undefined : await response.json()
  if (!response.ok) throw new RequestProblem(ProblemDetails.parse(body))
  return schema.parse(body)
}

async function fetchAnswer(path: string, ask: Ask): Promise<Response> {
  const json = ask.body !== undefined && !(ask.body instanceof FormData)
  try {
    return await fetch(path, {
      method: ask.method ?? 'GET',
      credentials: 'same-origin',
      headers: { ...(json && { 'content-type': 'application/json' }), ...ask.headers },
      body: json ? JSON.stringify(ask.body) : (ask.body as FormData | undefined),
      signal: ask.signal,
    })
  } catch (cause) {
    if (cause instanceof DOMException && cause.name === 'AbortError') throw cause
    throw new NoAnswer('There was no answer from the site.', { cause })
  }
}
