import { expect, test } from 'vitest'
import { Line1, RichText } from './text'

const nested = (depth: number): unknown => {
  let block: unknown = { type: 'paragraph', attrs: { id: 'paragraph-000001' } }
  for (let i = 0; i < depth; i += 1)
    block = { type: 'note', attrs: { id: `note-00000000-${i}` }, content: [block] }
  return { type: 'doc', content: [block] }
}

test('notes and lists nest as deep as anybody writes', () => {
  expect(RichText.safeParse(nested(20)).success).toBe(true)
})

test('a text nested a hundred thousand deep is refused without exhausting the stack', () => {
  const found = RichText.safeParse(nested(100_000))
  expect(found.error?.issues).toMatchObject([{ message: 'The lists of this text are nested too deeply.' }])
})

test('an unknown node, an unknown mark and a script as a link are refused', () => {
  const withInline = (inline: unknown) => ({
    type: 'doc',
    content: [{ type: 'paragraph', attrs: { id: 'paragraph-000001' }, content: [inline] }],
  })
  expect(RichText.safeParse(withInline({ type: 'text', text: 'a' })).success).toBe(true)
  expect(RichText.safeParse(withInline({ type: 'iframe' })).success).toBe(false)
  expect(
    RichText.safeParse(withInline({ type: 'text', text: 'a', marks: [{ type: 'blink' }] })).success,
  ).toBe(false)
  const link = (href: string) => ({ type: 'text', text: 'a', marks: [{ type: 'link', attrs: { href } }] })
  expect(RichText.safeParse(withInline(link('https://example.org'))).success).toBe(true)
  expect(RichText.safeParse(withInline(link('javascript:alert(1)'))).success).toBe(false)
  expect(RichText.safeParse(withInline(link('data:text/html,x'))).success).toBe(false)
})

test('half a surrogate pair is refused, a whole one is not', () => {
  expect(Line1.safeParse('a \u{1f529}').success).toBe(true)
  expect(Line1.safeParse('a \ud83d').success).toBe(false)
})
