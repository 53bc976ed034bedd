import { readFileSync } from 'node:fs'
import fc from 'fast-check'
import { expect, test } from 'vitest'
import { GuideDocument } from '../guide/schema'
import type { BroughtFile } from './broughtFile'
import { separatorOf } from './readCells'
import { toDocument } from './toDocument'
import { understand } from './understand'
import { Understanding } from './understanding'

const fixture = (path: string): BroughtFile => ({
  path,
  kind: 'text',
  text: readFileSync(new URL(`../../fixtures/import/${path}`, import.meta.url), 'utf8'),
})

const ids = () => {
  let made = 0
  return () => `imported-${String((made += 1)).padStart(8, '0')}`
}

/** Counted in the file: "### 1." to "### 4.", 29 pictures in the whole, 8 in step 1. */
test('numbered headings are steps, their lists are instructions, every picture is listed', () => {
  const read = understand([
    fixture('omni-base/Assembly.md'),
    { path: 'omni-base/media/assembly_imgs/DSC00006.jpg', kind: 'picture', sha256: 'a'.repeat(64) },
  ])
  const steps = read.sections.flatMap((section) => section.steps).filter(({ include }) => include)
  expect(steps.slice(0, 3).map(({ title }) => title)).toEqual([
    'Assemble Wheel Modules (3 per robot)',
    'Bottom Plate Assembly',
    'Top plate Assembly',
  ])
  expect(steps[0]!.figures.map(({ state }) => state)).toEqual([
    'missing',
    'missing',
    'missing',
    'missing',
    'found',
    'missing',
    'missing',
    'missing',
  ])
  expect(steps[0]!.body.content[0]).toMatchObject({ type: 'orderedList' })
  expect(steps[0]!.uses[0]).toMatchObject({
    typed: '4 m2x5 tap screws',
    quantity: { value: '4', unit: 'each' },
    include: false,
  })
})

/** Thirteen rows in the table of 3DPrinting.md. */
test('a table of printed parts: numbers, substitutes by "or", models by their links', () => {
  const read = understand([
    fixture('omni-base/3DPrinting.md'),
    { path: 'omni-base/3DPrintMeshes/drive_motor_mount_v2.stl', kind: 'model', sha256: 'b'.repeat(64) },
  ])
  expect(read.lines).toHaveLength(13)
  const mount = read.lines.find(({ name }) => name === 'Drive motor mount')
  expect(mount).toMatchObject({ kind: 'printed', quantity: { value: '3' }, modelKey: read.models[0]!.key })
  expect(read.lines.find(({ name }) => name === '12v Battery mount')?.substitutes).toEqual([
    '12v EU Battery mount',
    '5v Battery mount',
  ])
  const document = toDocument(
    read,
    ids(),
    new Map([['b'.repeat(64), { sha256: 'b'.repeat(64), mediaType: 'model/stl', bytes: 1, name: 'm.stl' }]]),
  )
  expect(
    document.lines.find((line) => line.options[0]!.part.name === 'Drive motor mount')?.options[0]!.print
      ?.model,
  ).toBe(document.models[0]!.id)
})

/** Counted in the file: 33 rows under the heading, the last three without their name's cell. */
test('rows that are shifted by a cell are said in their place and get no quantity', () => {
  const read = understand([fixture('tank-level/BOM.csv')])
  expect(read.lines).toHaveLength(33)
  expect(read.tables[0]!.rows.filter(({ problem }) => problem !== null)).toHaveLength(3)
  expect(read.lines.slice(-3).map(({ name, typed, quantity }) => [name, typed, quantity])).toEqual([
    ['Cable glands', '2', null],
    ['Gasket', '1', null],
    ['Mounting screws', '4', null],
  ])
  expect(read.lines.find(({ name }) => name.startsWith('Decoupling caps'))?.quantity).toEqual({
    value: '8',
    unit: 'each',
    typed: '~8',
  })
  expect(read.lines.find(({ name }) => name === 'Antenna')?.quantity).toMatchObject({ value: '1' })
  expect(read.lines.find(({ name }) => name === 'SH1106 1.3" OLED display')).toBeDefined()
})

test('the separator is what gives rows of equal length', () => {
  expect(separatorOf('a\tb, c, d\n1\t2, 3\n4\t5\n')).toBe('\t')
  expect(separatorOf('Teil;Menge\n"M2,5 x 12";4\nScheibe;8\n')).toBe(';')
})

const piece = fc.oneof(
  fc.constantFrom(
    '# ',
    '## 1. ',
    '- ',
    '1. ',
    '| a | Qty |\n|---|---|\n',
    '> [!WARNING]\n> ',
    '<div><img src="%zz">',
    '![](a%20b.png)',
    '```\n',
    '**Parts:**\n\n- ',
    '\n\n',
    '---\n',
    '<table><tr><td>',
    '\0',
    '\ud800',
    '"',
  ),
  fc.string({ unit: 'binary', maxLength: 30 }),
)
const text = fc.array(piece, { maxLength: 40 }).map((parts) => parts.join(''))
const file = fc.record({
  path: fc.oneof(
    fc.constantFrom('README.md', 'docs/a_de.md', 'bom.csv', 'LICENSE', 'x.tsv'),
    fc.string({ maxLength: 20 }),
  ),
  kind: fc.constant('text' as const),
  text,
})

test('whatever the files hold, it is read without an error and gives a document that can be kept', () => {
  fc.assert(
    fc.property(fc.array(file, { maxLength: 4 }), (files) => {
      const read = understand(files)
      const checked = Understanding.safeParse(read)
      expect(checked.error?.issues).toBeUndefined()
      const all = {
        ...read,
        sections: read.sections.map((section) => ({
          ...section,
          include: true,
          steps: section.steps.map((step) => ({ ...step, include: true })),
        })),
      }
      expect(GuideDocument.safeParse(toDocument(all, ids(), new Map())).error?.issues).toBeUndefined()
    }),
    { seed: 42, numRuns: 300 },
  )
})
