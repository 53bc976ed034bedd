import { describe, expect, test } from 'vitest'
import { SignalWord, WearCode } from '../../shared/guide/schema'
import { WEAR_CODES } from '../../shared/guide/wear'
import arabic from '../../src/locales/ar/guide.json'
import english from '../../src/locales/en/guide.json'
import { readReference } from './readReference'

const signs = readReference<{ code: string; referent: string }>('iso-7010')

describe(`protective equipment (${signs.source}; ${signs.status})`, () => {
  const worn = signs.rows.filter(
    ({ code, referent }) => code.startsWith('M') && /^(wear|use protective)/.test(referent),
  )

  test('what is offered is every sign of the list for something to wear', () => {
    expect([...WEAR_CODES]).toEqual(worn.map(({ code }) => code))
    expect(WEAR_CODES.every((code) => WearCode.safeParse(code).success)).toBe(true)
  })

  test('each has its name in both languages, in English by the words of the referent', () => {
    expect(Object.keys(english.wear)).toEqual([...WEAR_CODES])
    expect(Object.keys(arabic.wear)).toEqual([...WEAR_CODES])
    for (const { code, referent } of worn) {
      const name = english.wear[code as keyof typeof english.wear].toLowerCase()
      expect(referent.replace(/^(wear|use) (an? )?/, '')).toBe(name)
    }
  })
})

const words = readReference<Record<'lang' | SignalWord, string>>('signal-words')

test.each([
  ['en', english],
  ['ar', arabic],
])(`signal words in %s (${words.source}; ${words.status})`, (lang, sentences) => {
  const row = words.rows.find((each) => each.lang === lang)!
  expect(sentences.signal).toEqual(Object.fromEntries(SignalWord.options.map((word) => [word, row[word]])))
})
