import fc from 'fast-check'
import { expect, test } from 'vitest'
import { arbitraryDocument } from '../../shared/guide/testing/arbitraryDocument'
import { canonicalJson, hashOf } from '../../shared/lib/json/hash'
import { readReference } from './readReference'

const { rows, source } = readReference<{ input?: string; output?: string }>('canonical-json')
const examples = rows.filter((row): row is { input: string; output: string } => row.input !== undefined)

test.each(examples)(`$input (${source})`, ({ input, output }) => {
  expect(canonicalJson(JSON.parse(input))).toBe(output)
})

const numbers = readReference<{ bits: string; json: string }>('ieee-754-numbers')

test.each(numbers.rows)(`the double $bits is $json (${numbers.source})`, ({ bits, json }) => {
  const view = new DataView(new ArrayBuffer(8))
  view.setBigUint64(0, BigInt(`0x${bits}`))
  expect(canonicalJson(view.getFloat64(0))).toBe(json)
})

test(`keys sort by UTF-16 code units (${source}, 3.2.3)`, () => {
  const sorted = ['\r', '1', '\u0080', 'ö', '€', '😀', '\ufb33']
  const value = Object.fromEntries([...sorted].reverse().map((key) => [key, 0]))
  expect(canonicalJson(value)).toBe(`{${sorted.map((key) => `${JSON.stringify(key)}:0`).join(',')}}`)
})

test(`what JSON cannot hold is an error (${source}, 3.2.2)`, () => {
  for (const value of [NaN, Infinity, -Infinity, 'half a pair \ud83d', undefined]) {
    expect(() => canonicalJson(value)).toThrow()
  }
})

/** SHA-256 of the empty object's two bytes. Source: any implementation; `printf '{}' | sha256sum`. */
test('the hash is SHA-256 of the canonical bytes', () => {
  expect(hashOf({})).toBe('44136fa355b3678a1146ad16f7e8649e94fb4fc21fe77e8310c060f61caaff8a')
})

test('the order of keys never matters, nor what is undefined', () => {
  const turned = (value: unknown): unknown => {
    if (Array.isArray(value)) return value.map(turned)
    if (typeof value !== 'object' || value === null) return value
    const fields = Object.entries(value).reverse()
    return Object.fromEntries([...fields.map(([key, child]) => [key, turned(child)]), ['nothing', undefined]])
  }
  fc.assert(
    fc.property(fc.oneof(arbitraryDocument, fc.jsonValue()), (value) => {
      expect(canonicalJson(turned(value))).toBe(canonicalJson(value))
    }),
    { seed: 20261201, numRuns: 200 },
  )
})
