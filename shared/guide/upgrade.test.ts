import { readdirSync, readFileSync } from 'node:fs'
import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { hashOf } from '../lib/json/hash'
import { emptyDocument } from './emptyDocument'
import { SCHEMA_VERSION } from './schema'
import { arbitraryDocument } from './testing/arbitraryDocument'
import { countedIds } from './testing/draws'
import { soundDocument } from './testing/soundDocument'
import { readDocument } from './upgrade'

const folder = new URL('../../fixtures/documents/', import.meta.url)
const stored = (name: string): unknown => JSON.parse(readFileSync(new URL(name, folder), 'utf8'))

/** The stored document of each version, by the hash that it has had since it was stored. Never changed, only added to. */
const HASHES: Record<string, string> = {
  'v1.json': 'bed2fdbc71b66e0a3f624eec4eb28dd9b7878411ab29f7bd1f8ad84ebdf1ee5d',
}

describe('stored documents', () => {
  test('there is one of every version', () => {
    const files = readdirSync(folder).filter((name) => name.endsWith('.json'))
    expect(files.sort()).toEqual(Object.keys(HASHES).sort())
    expect(files).toHaveLength(SCHEMA_VERSION)
  })

  test.each(Object.entries(HASHES))('%s is as it was stored, and is read', (name, hash) => {
    const json = stored(name)
    expect(hashOf(json)).toBe(hash)
    const outcome = readDocument(json)
    if (!outcome.ok) expect.fail(JSON.stringify(outcome))
    expect(outcome.document.schema).toBe(SCHEMA_VERSION)
  })

  test('the one of this version is read without losing a field', () => {
    const json = stored(`v${SCHEMA_VERSION}.json`)
    expect(readDocument(json)).toEqual({ ok: true, document: json })
  })
})

test('what was written as a document is read as the same one', () => {
  fc.assert(
    fc.property(arbitraryDocument, (doc) => {
      expect(readDocument(JSON.parse(JSON.stringify(doc)))).toEqual({
        ok: true,
        document: JSON.parse(JSON.stringify(doc)),
      })
    }),
    { seed: 20261201, numRuns: 100 },
  )
})

test('an empty document is one', () => {
  const next = countedIds('empty')
  const doc = emptyDocument(() => next('node'), { lang: 'en', title: '' })
  expect(readDocument(doc)).toEqual({ ok: true, document: doc })
})

test.each([null, 1, 'text', [], {}, { schema: '1' }, { schema: 0 }, { schema: 1.5 }])(
  '%j is not a document',
  (json) => {
    expect(readDocument(json)).toEqual({ ok: false, why: 'not a document' })
  },
)

test('a newer version is refused as such', () => {
  const newer = { ...soundDocument(), schema: SCHEMA_VERSION + 1 }
  expect(readDocument(newer)).toEqual({
    ok: false,
    why: 'newer',
    version: SCHEMA_VERSION + 1,
    newest: SCHEMA_VERSION,
  })
})

test('what breaks the schema is refused with the place', () => {
  const sound = soundDocument()
  expect(readDocument({ ...sound, title: 5 })).toMatchObject({
    ok: false,
    why: 'wrong',
    errors: [{ path: ['title'] }],
  })
  expect(
    readDocument({ ...sound, lines: [{ ...sound.lines[0], quantity: { value: '1e3', unit: 'each' } }] }),
  ).toMatchObject({
    why: 'wrong',
    errors: [{ path: ['lines', 0, 'quantity', 'value'] }],
  })
})

test('an id that stands twice is refused', () => {
  const sound = soundDocument()
  const twice = { ...sound, tools: [sound.tools[0]!, sound.tools[0]!] }
  expect(readDocument(twice)).toMatchObject({
    ok: false,
    why: 'wrong',
    errors: [{ message: expect.stringContaining('tool-wrench-1') }],
  })
})
