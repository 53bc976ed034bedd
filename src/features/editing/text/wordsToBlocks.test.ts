import { expect, test } from 'vitest'
import { inlines, wordsToBlocks } from './wordsToBlocks'

const p = (...texts: string[]) => ({
  type: 'paragraph',
  content: texts.map((text) => ({ type: 'text', text })),
})

test('numbered lines are instructions, dashes are points, empty lines part paragraphs', () => {
  expect(wordsToBlocks('Do it:\n\n1. Cut\n2) Drill\n\n- a nut\n* a bolt\n\nDone')).toEqual([
    p('Do it:'),
    {
      type: 'orderedList',
      content: [
        { type: 'listItem', content: [p('Cut')] },
        { type: 'listItem', content: [p('Drill')] },
      ],
    },
    {
      type: 'bulletList',
      content: [
        { type: 'listItem', content: [p('a nut')] },
        { type: 'listItem', content: [p('a bolt')] },
      ],
    },
    p('Done'),
  ])
})

test('quoted lines are a note, headings lose their mark', () => {
  expect(wordsToBlocks('# Title\n\n> mind\n> it')).toEqual([
    p('Title'),
    { type: 'note', content: [p('mind'), p('it')] },
  ])
})

test('a line that begins nothing goes on with the one before', () => {
  expect(wordsToBlocks('1. Cut the\npipe')).toMatchObject([
    { content: [{ content: [{ content: [{ text: 'Cut the' }, { type: 'lineBreak' }, { text: 'pipe' }] }] }] },
  ])
})

test('marks round words, and what only looks like them', () => {
  expect(inlines('a **b** *c* `d` [e](https://f.org) [g](javascript:h) 2 * 3 * 4')).toEqual([
    { type: 'text', text: 'a ' },
    { type: 'text', text: 'b', marks: [{ type: 'strong' }] },
    { type: 'text', text: ' ' },
    { type: 'text', text: 'c', marks: [{ type: 'emphasis' }] },
    { type: 'text', text: ' ' },
    { type: 'text', text: 'd', marks: [{ type: 'code' }] },
    { type: 'text', text: ' ' },
    { type: 'text', text: 'e', marks: [{ type: 'link', attrs: { href: 'https://f.org' } }] },
    { type: 'text', text: ' ' },
    { type: 'text', text: 'g' },
    { type: 'text', text: ' 2 * 3 * 4' },
  ])
})
