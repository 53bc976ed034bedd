import type { IncomingMessage } from 'node:http'

const LANGUAGES = ['en', 'ar']

/** The language of the interface for a request: its address, the reader's choice in a cookie, what the browser asks for, English. */
export function languageOf(req: IncomingMessage): string {
  const named = /[?&]lang=([a-zA-Z-]+)/.exec(req.url ?? '')?.[1]
  const chosen = /(?:^|;\s*)quern_language=([a-zA-Z-]+)/.exec(req.headers.cookie ?? '')?.[1]
  return known(named) ?? known(chosen) ?? accepted(req.headers['accept-language'] ?? '') ?? 'en'
}

const known = (tag: string | undefined): string | undefined => {
  const language = tag?.toLowerCase().split('-')[0]
  return LANGUAGES.find((candidate) => candidate === language)
}

/** RFC 9110, 12.5.4: the tags by their weight. */
function accepted(header: string): string | undefined {
  return header
    .split(',')
    .map((part) => {
      const [tag = '', ...parameters] = part.trim().split(';')
      const weight = parameters
        .map((parameter) => /^\s*q=([\d.]+)/.exec(parameter)?.[1])
        .find((value) => value !== undefined)
      return { language: known(tag), weight: weight === undefined ? 1 : Number(weight) }
    })
    .filter(({ language, weight }) => language !== undefined && weight > 0)
    .sort((a, b) => b.weight - a.weight)[0]?.language
}
