import { readFileSync } from 'node:fs'

/** A table of values from outside: every row a fact, `source` where it is written, `status` how it came here. */
interface Reference<Row> {
  title: string
  source: string
  status: string
  rows: Row[]
}

/** Reads `fixtures/reference/<name>.json`. The caller says what its rows are. */
export function readReference<Row, More = object>(name: string): Reference<Row> & More {
  const file = new URL(`../../fixtures/reference/${name}.json`, import.meta.url)
  return JSON.parse(readFileSync(file, 'utf8')) as Reference<Row> & More
}
