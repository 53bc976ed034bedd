import type { z } from 'zod'
import { ProblemDetails } from '../../shared/api/problems'

/** What came back, with the body as text, as JSON and by a contract. */
export class Answer {
  constructor(
    readonly status: number,
    readonly headers: Headers,
    readonly bytes: Uint8Array<ArrayBuffer>,
  ) {}

  get text(): string {
    return new TextDecoder().decode(this.bytes)
  }

  get json(): unknown {
    return JSON.parse(this.text)
  }

  get etag(): string {
    return this.headers.get('etag') ?? ''
  }

  /** The body by its contract. @throws an error that shows the answer when it is a refusal. */
  read<Schema extends z.ZodType>(schema: Schema): z.output<Schema> {
    if (this.status >= 400) throw new Error(`${this.status}: ${this.text}`)
    return schema.parse(this.json)
  }

  /** The refusal. @throws when it is none. */
  problem(): ProblemDetails & { kind: string } {
    if (this.headers.get('content-type')?.startsWith('application/problem+json') !== true) {
      throw new Error(`Not a problem: ${this.status} ${this.text.slice(0, 500)}`)
    }
    const details = ProblemDetails.parse(this.json)
    return { ...details, kind: details.type.split('/').at(-1) ?? '' }
  }
}

type HeaderList = Record<string, string>
export interface FileToSend {
  name: string
  bytes: Uint8Array<ArrayBuffer> | string
}

/** Speaks HTTP with the site as one person. */
export class Client {
  constructor(
    private readonly address: string,
    private readonly cookie: string | null,
  ) {}

  get(path: string, headers: HeaderList = {}): Promise<Answer> {
    // fetch would add no-cache to a conditional request, and no server may answer 304 to that.
    return this.send('GET', path, undefined, { 'cache-control': 'max-age=0', ...headers })
  }
  post(path: string, body?: unknown, headers: HeaderList = {}): Promise<Answer> {
    return this.send('POST', path, body, headers)
  }
  put(path: string, body?: unknown, headers: HeaderList = {}): Promise<Answer> {
    return this.send('PUT', path, body, headers)
  }
  patch(path: string, body?: unknown, headers: HeaderList = {}): Promise<Answer> {
    return this.send('PATCH', path, body, headers)
  }
  delete(path: string, body?: unknown, headers: HeaderList = {}): Promise<Answer> {
    return this.send('DELETE', path, body, headers)
  }

  /** Sends files as a form does. */
  upload(path: string, files: readonly FileToSend[], fields: Record<string, string> = {}): Promise<Answer> {
    const form = new FormData()
    for (const [name, value] of Object.entries(fields)) form.append(name, value)
    for (const file of files) form.append('files', new Blob([file.bytes]), file.name)
    return this.fetch('POST', path, {}, form)
  }

  private send(method: string, path: string, body: unknown, headers: HeaderList): Promise<Answer> {
    if (body === undefined) return this.fetch(method, path, headers)
    const text = typeof body === 'string' ? body : JSON.stringify(body)
    return this.fetch(method, path, { 'content-type': 'application/json', ...headers }, text)
  }

  private async fetch(
    method: string,
    path: string,
    headers: HeaderList,
    body?: string | FormData,
  ): Promise<Answer> {
    const response = await fetch(`${this.address}${path}`, {
      method,
      redirect: 'manual',
      headers: { ...(this.cookie !== null && { cookie: this.cookie }), ...headers },
      body,
    })
    return new Answer(response.status, response.headers, new Uint8Array(await response.arrayBuffer()))
  }
}
