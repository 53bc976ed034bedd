import { expect, test } from 'vitest'
import { slugOf } from './slugOf'

test.each([
  ['A stream-powered generator', 'a-stream-powered-generator'],
  ['Ölmühle Größe 2', 'olmuhle-grosse-2'],
  ["The miller's stone", 'the-millers-stone'],
  ['مضخة الحبل', 'مضخة-الحبل'],
  ['रस्सी पंप', 'रस्सी-पंप'],
  ['水車の作り方', '水車の作り方'],
  ['…', 'untitled'],
  ['', 'untitled'],
])('%s → %s', (title, slug) => {
  expect(slugOf(title)).toBe(slug)
})

test('a long title is cut, without a hyphen at the end', () => {
  const slug = slugOf('word '.repeat(60))
  expect(slug.length).toBeLessThanOrEqual(80)
  expect(slug).toMatch(/word$/)
})
