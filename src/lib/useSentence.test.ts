import { expect, test } from 'vitest'
import { PROBLEMS } from '../../shared/api/problems'
import sentences from '../locales/ar/problems.json'

const valuesIn = (sentence: string): string[] =>
  [...sentence.matchAll(/\{+(\w+)\}+/g)].map(([, name]) => name!).sort()

test('every refusal of the site has its sentence in Arabic, with the same values in it', () => {
  expect(Object.keys(sentences).sort()).toEqual(Object.keys(PROBLEMS).sort())
  for (const [type, { title }] of Object.entries(PROBLEMS)) {
    expect([type, valuesIn(sentences[type as keyof typeof sentences])]).toEqual([type, valuesIn(title)])
  }
})
