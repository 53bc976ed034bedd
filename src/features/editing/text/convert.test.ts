// @vitest-environment happy-dom
import { Editor } from '@tiptap/core'
import fc from 'fast-check'
import { expect, test } from 'vitest'
import { emptyDocument } from '../../../../shared/guide/emptyDocument'
import { numbering } from '../../../../shared/guide/numbering'
import { RichText, type Block, type Inline, type Mark } from '../../../../shared/guide/schema'
import { unitCodes } from '../../../../shared/lib/units/units'
import { newId } from '../state/newId'
import { fromEditor, toEditor } from './convert'
import { lastingIds } from './lastingIds'
import { listKeys } from './listKeys'
import { pasting } from './pasting'
import { takeOver } from './takeOver'
import { TextHost } from './textHost'
import { textMarks } from './textMarks'
import { textNodes } from './textNodes'

const document = emptyDocument(newId, { lang: 'en', title: '' })
const host = new TextHost(
  {
    document,
    numbers: numbering(document),
    files: new Map(),
    choices: {},
    edit: () => undefined,
    newId,
    bringFiles: () => Promise.resolve([]),
    announce: () => undefined,
    readOnly: false,
  },
  'step00000000',
  (names) => names,
)

const editorOf = (text: RichText): Editor =>
  new Editor({
    extensions: [...textNodes(host), ...textMarks, lastingIds(newId), listKeys, pasting],
    content: toEditor(text, newId),
  })

const idText = fc.stringMatching(/^[a-z][a-z0-9]{11,20}$/)
/** Marks in the order in which they are stored, each once. */
const marks = fc
  .tuple(
    fc.boolean(),
    fc.boolean(),
    fc.boolean(),
    fc.option(fc.constantFrom('https://example.org/', '#a', 'mailto:a@b.c')),
  )
  .map(([strong, emphasis, code, href]): { marks?: Mark[] } => {
    const all: Mark[] = [
      ...(strong ? [{ type: 'strong' } as const] : []),
      ...(emphasis ? [{ type: 'emphasis' } as const] : []),
      ...(code ? [{ type: 'code' } as const] : []),
      ...(href !== null ? [{ type: 'link', attrs: { href } } as const] : []),
    ]
    return all.length > 0 ? { marks: all } : {}
  })
const measure = fc.record(
  {
    value: fc.stringMatching(/^-?\d{1,5}(\.\d{1,3})?$/),
    unit: fc.constantFrom(...unitCodes),
    typed: fc.string({ minLength: 1, maxLength: 10 }),
  },
  { requiredKeys: ['value', 'unit'] },
)
const atom: fc.Arbitrary<Inline> = fc.oneof(
  fc.constant({ type: 'lineBreak' } as const),
  fc.tuple(idText, marks).map(([line, rest]) => ({ type: 'balloon', attrs: { line }, ...rest }) as const),
  fc.tuple(measure, marks).map(([attrs, rest]) => ({ type: 'quantity', attrs, ...rest }) as const),
  fc
    .tuple(idText, marks)
    .map(([figure, rest]) => ({ type: 'figureRef', attrs: { figure }, ...rest }) as const),
  fc.tuple(idText, marks).map(([step, rest]) => ({ type: 'stepRef', attrs: { step }, ...rest }) as const),
)
const words: fc.Arbitrary<Inline> = fc
  .tuple(fc.string({ minLength: 1, unit: 'grapheme' }), marks)
  .map(([text, rest]) => ({ type: 'text', text, ...rest }))
/** Text and atoms in turn: two texts beside each other with the same marks would be one. */
const inlines = fc
  .array(fc.tuple(words, atom), { minLength: 1, maxLength: 4 })
  .map((pairs): Inline[] => pairs.flat())
const condition = fc.array(
  fc.record({ line: idText, is: fc.array(idText, { minLength: 1, maxLength: 2 }) }),
  {
    minLength: 1,
    maxLength: 2,
  },
)
const { block } = fc.letrec<{ block: Block }>((tie) => ({
  block: fc.oneof(
    { maxDepth: 3, withCrossShrink: true },
    fc.tuple(idText, fc.option(inlines)).map(([id, content]): Block => ({
      type: 'paragraph',
      attrs: { id },
      ...(content !== null && { content }),
    })),
    fc
      .tuple(
        fc.constantFrom('orderedList', 'bulletList'),
        idText,
        fc.array(
          fc
            .tuple(idText, fc.option(condition), fc.array(tie('block'), { minLength: 1, maxLength: 3 }))
            .map(([id, when, content]) => ({
              type: 'listItem' as const,
              attrs: { id, ...(when !== null && { when }) },
              content,
            })),
          { minLength: 1, maxLength: 3 },
        ),
      )
      .map(([type, id, content]): Block => ({
        type: type as 'orderedList' | 'bulletList',
        attrs: { id },
        content,
      })),
    fc
      .tuple(idText, fc.array(tie('block'), { minLength: 1, maxLength: 3 }))
      .map(([id, content]): Block => ({ type: 'note', attrs: { id }, content })),
  ),
}))
const richText = fc
  .array(block, { minLength: 1, maxLength: 4 })
  .map((content): RichText => ({ type: 'doc', content }))
  .filter((text) => RichText.safeParse(text).success)

test('every text goes through the editor and comes back the same', () => {
  const editor = editorOf({ type: 'doc', content: [] })
  fc.assert(
    fc.property(richText, (text) => {
      const node = editor.schema.nodeFromJSON(toEditor(text, newId))
      node.check()
      expect(fromEditor(node.toJSON())).toEqual(text)
    }),
    { seed: 4107, numRuns: 100 },
  )
})

test('an editor that opens a text has that text, and taking another over has the other', () => {
  fc.assert(
    fc.property(richText, richText, (one, other) => {
      const editor = editorOf(one)
      expect(fromEditor(editor.getJSON())).toEqual(one)
      takeOver(editor, other, newId)
      // Blocks of one text may not share ids: lastingIds gives the second of two a new one.
      const idsOf = (text: RichText) => JSON.stringify(text).match(/"attrs":\{"id":"[^"]+"/g) ?? []
      fc.pre(new Set(idsOf(other)).size === idsOf(other).length)
      expect(fromEditor(editor.getJSON())).toEqual(other)
      editor.destroy()
    }),
    { seed: 4107, numRuns: 25 },
  )
})

test('an empty text has a place to write in, and is stored as before where nothing is written', () => {
  const editor = editorOf({ type: 'doc', content: [] })
  expect(editor.getJSON().content).toHaveLength(1)
  expect(fromEditor(editor.getJSON()).content[0]).toMatchObject({
    type: 'paragraph',
    attrs: { id: expect.any(String) },
  })
})

const two: RichText = {
  type: 'doc',
  content: [
    { type: 'paragraph', attrs: { id: 'paragraph0001' }, content: [{ type: 'text', text: 'one two' }] },
    { type: 'paragraph', attrs: { id: 'paragraph0002' }, content: [{ type: 'text', text: 'three' }] },
  ],
}
const ids = (editor: Editor): (string | undefined)[] =>
  fromEditor(editor.getJSON()).content.map((each) => each.attrs.id)

test('a paragraph split in its middle keeps its id in front, the other half gets a new one', () => {
  const editor = editorOf(two)
  editor.chain().setTextSelection(4).splitBlock().run()
  expect(ids(editor)).toEqual(['paragraph0001', expect.not.stringMatching(/^paragraph/), 'paragraph0002'])
})

test('a paragraph split at its start keeps its id with its words', () => {
  const editor = editorOf(two)
  editor.chain().setTextSelection(1).splitBlock().run()
  expect(ids(editor)[1]).toBe('paragraph0001')
})

test('a copy put before its original gets new ids', () => {
  const editor = editorOf(two)
  const copy = editor.state.doc.child(0)
  editor.view.dispatch(editor.state.tr.insert(0, copy))
  expect(ids(editor).slice(1)).toEqual(['paragraph0001', 'paragraph0002'])
  expect(ids(editor)[0]).toMatch(/^[a-z][a-z0-9]{15}$/)
})

test('taking over a text from outside leaves the cursor in the paragraph where it was', () => {
  const editor = editorOf(two)
  editor.commands.setTextSelection(13)
  const longer: RichText = {
    type: 'doc',
    content: [
      {
        type: 'paragraph',
        attrs: { id: 'paragraph0001' },
        content: [{ type: 'text', text: 'one and a half two' }],
      },
      two.content[1]!,
    ],
  }
  takeOver(editor, longer, newId)
  expect(editor.state.selection.$from.parent.textContent).toBe('three')
  expect(editor.state.selection.$from.parentOffset).toBe(3)
})

test('HTML from elsewhere keeps paragraphs, lists, emphasis and links, and drops scripts, styles and bad addresses', () => {
  const editor = editorOf({ type: 'doc', content: [] })
  editor.commands.setContent(
    '<h2>Fit it</h2><p onclick="x()">Use <b>two</b> <i>long</i> <a href="https://example.org">bolts</a>, <a href="javascript:alert(1)">now</a>.' +
      '<script>alert(1)</script><img src="x" onerror="y"></p><ol><li>One</li><li>Two<ul><li>deep</li></ul></li></ol><blockquote>Mind it</blockquote><table><tr><td>cell</td></tr></table>',
  )
  const text = fromEditor(editor.getJSON())
  expect(RichText.parse(text)).toEqual(text)
  expect(JSON.stringify(text)).not.toMatch(/javascript|alert|onerror|onclick/)
  expect(text.content.map(({ type }) => type)).toEqual([
    'paragraph',
    'paragraph',
    'orderedList',
    'note',
    'paragraph',
  ])
  expect(JSON.stringify(text)).toContain('"marks":[{"type":"link","attrs":{"href":"https://example.org"}}]')
})
