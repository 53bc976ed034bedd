import { expect, test } from 'vitest'
import { directionOf, LanguageTag } from '../../shared/lib/language/direction'
import { readReference } from './readReference'

const { rows, source } = readReference<{ tag: string; dir: 'ltr' | 'rtl' }>('direction')

test.each(rows)(`$tag is written $dir (${source})`, ({ tag, dir }) => {
  expect(directionOf(tag)).toBe(dir)
})

test('a language tag is what BCP 47 allows', () => {
  for (const { tag } of rows) expect(LanguageTag.safeParse(tag).success).toBe(true)
  for (const wrong of ['', 'e', 'english language', 'en_GB', '../en', 'x'.repeat(40)])
    expect(LanguageTag.safeParse(wrong).success).toBe(false)
})
