import { expect, test } from 'vitest'
import { asWords } from './asWords'

test.each([
  ['a text', 'a text'],
  [null, ''],
  [35, '35'],
  [{ value: '4', unit: 'mm' }, '4 mm'],
  [{ value: '12', unit: 'each', typed: '12x' }, '12'],
  [{ id: 'node00000001', title: 'Mount it', steps: [] }, 'Mount it'],
  [
    [
      { type: 'text', text: 'at least ' },
      { type: 'quantity', attrs: { value: '4', unit: 'mm' } },
    ],
    'at least 4 mm',
  ],
  [
    {
      type: 'doc',
      content: [
        { type: 'paragraph', attrs: { id: 'node00000001' }, content: [{ type: 'text', text: 'One.' }] },
        { type: 'paragraph', attrs: { id: 'node00000002' }, content: [{ type: 'text', text: 'Two.' }] },
      ],
    },
    'One.\nTwo.',
  ],
])('%j is shown as %j', (value, words) => {
  expect(asWords(value)).toBe(words)
})
