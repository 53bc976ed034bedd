import Database from 'better-sqlite3'
import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { plainText, wordsOf } from './plainText'
import { quantityText } from './quantityText'
import type { RichText } from './schema'
import { cutWords, searchQuery, searchWords } from './searchWords'
import { soundDocument } from './testing/soundDocument'

/** The index as the site has it. */
function indexOf(...texts: string[]): (typed: string, lang?: string) => string[] {
  const db = new Database(':memory:')
  db.exec("create virtual table found using fts5(words, tokenize = 'unicode61 remove_diacritics 2')")
  for (const text of texts) db.prepare('insert into found values (?)').run(text)
  return (typed, lang = 'en') => {
    const query = searchQuery(typed, lang)
    if (query === undefined) return []
    const rows = db.prepare('select words from found where found match ? order by rowid').all(query)
    return (rows as { words: string }[]).map(({ words }) => words)
  }
}

describe('the words of a guide', () => {
  test('hold what is written in steps, lists and figures, and parts by name where the text has a balloon', () => {
    const words = searchWords(soundDocument())
    expect(words).toContain('Put in the Bolt M8 as in 1.1 then go on with 2')
    for (const word of ['Frame', 'Wrench', 'gap', 'Sharp', 'steel', 'front']) expect(words).toContain(word)
    expect(words).not.toMatch(/[\n,.] /)
  })

  test('of scripts without spaces are cut by the language', () => {
    expect(cutWords('轴承和螺栓', 'zh').split(' ')).toContain('螺栓')
    expect(cutWords('ใส่น็อตเข้ากับเพลา', 'th').split(' ').length).toBeGreaterThan(3)
    expect(cutWords('ركّب المضخة، ثم الحبل.', 'ar')).toBe('ركّب المضخة ثم الحبل')
  })
})

test('a text of a megabyte is cut without taking all memory, and no word is cut in two', () => {
  const sentence = 'Push the bearing into its seat, 0.2 mm deep. '
  const words = cutWords(sentence.repeat(25_000), 'en')
  expect(words).toBe(`${'Push the bearing into its seat 0.2 mm deep '.repeat(25_000)}`.trim())
  expect(searchQuery('x'.repeat(1_000_000), 'en')).toBeDefined()
})

describe('what is typed finds', () => {
  const find = indexOf(
    'shaft bearing 6204 2RS',
    cutWords('轴承和螺栓', 'zh'),
    'المضخة والحبل',
    'Rührwerk mit Welle',
  )

  test.each([
    ['a word', 'bearing', 'en', 0],
    ['the beginning of the last word', 'shaft bear', 'en', 0],
    ['a designation with its sign', '6204-2RS', 'en', 0],
    ['Chinese within a sentence', '螺栓', 'zh', 1],
    ['Arabic', 'المضخة', 'ar', 2],
    ['letters with and without their marks', 'ruhrwerk', 'en', 3],
  ])('%s', (_, typed, lang, at) => {
    const texts = [
      'shaft bearing 6204 2RS',
      cutWords('轴承和螺栓', 'zh'),
      'المضخة والحبل',
      'Rührwerk mit Welle',
    ]
    expect(find(typed, lang)).toEqual([texts[at]])
  })

  test('nothing that does not have every word, and only whole words before the last', () => {
    expect(find('shaft wheel')).toEqual([])
    expect(find('sha bearing')).toEqual([])
    expect(find('bear ')).toEqual([])
  })

  test.each(['', '   ', '"', '*', '-', '( ) : ^'])('nothing at all for %j, without an error', (typed) => {
    expect(searchQuery(typed, 'en')).toBeUndefined()
  })

  test('no operator, column or quotation of the query language, whatever is typed', () => {
    expect(find('bearing OR wheel')).toEqual([])
    expect(find('NOT wheel')).toEqual([])
    expect(find('words:bearing')).toEqual([])
    expect(find('"bearing')).toHaveLength(1)
    fc.assert(
      fc.property(fc.string({ unit: 'grapheme' }), (typed) => {
        expect(() => find(typed)).not.toThrow()
      }),
      { seed: 20261201, numRuns: 500 },
    )
  })
})

describe('plain text', () => {
  const words = { line: () => 'the shaft', figure: () => '7.1', step: () => '8' }
  const text: RichText = {
    type: 'doc',
    content: [
      {
        type: 'paragraph',
        attrs: { id: 'paragraph-001' },
        content: [
          { type: 'text', text: 'Push ' },
          { type: 'balloon', attrs: { line: 'line-0000001' } },
          { type: 'text', text: ' in by ' },
          { type: 'quantity', attrs: { value: '0.2', unit: 'mm' } },
          { type: 'lineBreak' },
          { type: 'figureRef', attrs: { figure: 'figure-00001' } },
        ],
      },
      { type: 'paragraph', attrs: { id: 'paragraph-002' } },
      {
        type: 'orderedList',
        attrs: { id: 'list-0000001' },
        content: [
          {
            type: 'listItem',
            attrs: { id: 'item-0000001' },
            content: [
              {
                type: 'note',
                attrs: { id: 'note-0000001' },
                content: [
                  {
                    type: 'paragraph',
                    attrs: { id: 'paragraph-003' },
                    content: [{ type: 'stepRef', attrs: { step: 'step-0000001' } }],
                  },
                ],
              },
            ],
          },
        ],
      },
    ],
  }

  test('has a line for each paragraph that says something', () => {
    expect(plainText(text, words)).toBe('Push the shaft in by 0.2\u00a0mm\n7.1\n8')
  })

  test('says parts by name, and nothing for what is not there', () => {
    expect(wordsOf(soundDocument()).line('line-bolt-001')).toBe('Bolt M8')
    expect(wordsOf(soundDocument()).line('nowhere-00001')).toBe('')
  })

  test.each([
    [{ value: '12', unit: 'each' }, '12'],
    [{ value: '90', unit: 'deg' }, '90°'],
    [{ value: '60', unit: '%' }, '60%'],
    [{ value: '-3.5', unit: 'degC' }, '-3.5\u00a0°C'],
  ] as const)('%j is %s', (quantity, said) => {
    expect(quantityText(quantity)).toBe(said)
  })
})
