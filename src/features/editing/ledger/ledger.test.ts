import fc from 'fast-check'
import { describe, expect, test } from 'vitest'
import { emptyDocument } from '../../../../shared/guide/emptyDocument'
import { GuideDocument, type Line } from '../../../../shared/guide/schema'
import { newId } from '../state/newId'
import { newLine } from '../step/newLine'
import { cellText, COLUMNS, setCell, type Column } from './columns'
import { gridAt, gridKey, rangeOf, startOfGrid, type GridKey, type GridState } from './grid'
import { depthOf, moveLine, nestDeeper, nestOut } from './lineOrder'
import { pasteBlock } from './pasteBlock'
import { readTsv, writeTsv } from './tsv'

const kinds = {
  bought: 'Bought',
  printed: 'Printed',
  cut: 'Cut from stock',
  made: 'Made',
  consumable: 'Consumable',
}
const lines = ['Bolt M8', 'Bracket', 'Belt'].map((name) => newLine(newId, name))
const doc: GuideDocument = { ...emptyDocument(newId, { lang: 'en', title: 'A pump' }), lines }
const ids = lines.map(({ id }) => id)

describe('a cell', () => {
  const written = (column: Column, text: string, from = doc) => {
    const outcome = setCell(from, ids[0]!, column, text, kinds)
    return outcome.ok ? outcome.document.lines[0]! : outcome.why
  }

  test.each([
    ['kind', 'Printed', { kind: 'printed' }],
    ['kind', '3d printed', { kind: 'printed' }],
    ['quantity', '1/2 in', { quantity: { value: '0.5', unit: 'in', typed: '1/2 in' } }],
    ['quantity', '~8', { quantity: { value: '8', unit: 'each', typed: '~8' } }],
    ['quantity', 'as needed', { quantity: null }],
    ['quantity', '', { quantity: null }],
    ['unit', 'sets', { quantity: { value: '1', unit: 'set' } }],
    ['spare', '10 %', { sparePercent: '10' }],
    ['note', 'two\nlines', { note: 'two\nlines' }],
  ] as const)('%s takes "%s"', (column, text, line) => {
    expect(written(column, text)).toMatchObject(line)
  })

  test.each([
    ['kind', 'borrowed', 'unknown kind'],
    ['quantity', 'a few', 'no number'],
    ['quantity', '1,000', 'ambiguous'],
    ['unit', 'furlong', 'unknown unit'],
    ['spare', 'some', 'not a percentage'],
    ['model', 'bracket', 'not printed'],
    ['name', 'x'.repeat(301), 'too much text'],
  ] as const)('%s refuses "%s": %s', (column, text, why) => {
    expect(written(column, text)).toBe(why)
  })

  test('a unit keeps to a new quantity, and is refused where there is none', () => {
    const metres = setCell(doc, ids[0]!, 'unit', 'm', kinds)
    expect(metres.ok && written('quantity', '3', metres.document)).toMatchObject({
      quantity: { value: '3', unit: 'm' },
    })
    const none = setCell(doc, ids[0]!, 'quantity', '', kinds)
    expect(none.ok && written('unit', 'm', none.document)).toBe('no quantity')
  })

  test('a model is taken by its name or by the name of its file, for a printed line', () => {
    const model = { id: newId(), asset: 'a'.repeat(64), name: 'Runner', unit: 'mm', material: '' } as const
    const printed = setCell({ ...doc, models: [model] }, ids[0]!, 'kind', 'printed', kinds)
    const line = printed.ok && written('model', 'runner.STL', printed.document)
    expect(line).toMatchObject({ options: [{ print: { model: model.id } }] })
  })

  test('what it shows, written again, changes nothing', () => {
    for (const column of COLUMNS) {
      const outcome = setCell(doc, ids[0]!, column, cellText(doc, lines[0]!, column, kinds), kinds)
      expect(outcome.ok && outcome.document).toBe(doc)
    }
  })

  test('whatever is written, the document stays valid', () => {
    const text = fc.oneof(
      fc.string(),
      fc.constantFrom('1/2 in', '٣ م', '10%', '~8', '2x', 'Printed', '\u{1f529}', '\ud83d'),
    )
    fc.assert(
      fc.property(fc.constantFrom(...COLUMNS), text, (column, typed) => {
        const outcome = setCell(doc, ids[0]!, column, typed, kinds)
        if (outcome.ok) GuideDocument.parse(outcome.document)
      }),
      { seed: 4107, numRuns: 300 },
    )
  })
})

describe('a block from a spreadsheet', () => {
  test('is read with quoted cells, inch marks and any line ends', () => {
    expect(readTsv('a\tb\r\n"x\ty"\t"say ""hi"""\n1/2" bolt\t\n')).toEqual([
      ['a', 'b'],
      ['x\ty', 'say "hi"'],
      ['1/2" bolt', ''],
    ])
    expect(readTsv('"A" type\t"never closed')).toEqual([['"A" type', '"never closed']])
    expect(readTsv('one')).toEqual([['one']])
  })

  test('what is written as a block is read as it was', () => {
    const cell = fc.string({ unit: fc.constantFrom('a', '"', '\t', '\n', ' ', '1', '\r') })
    const width = fc.integer({ min: 2, max: 4 })
    const block = width.chain((n) =>
      fc.array(fc.array(cell, { minLength: n, maxLength: n }), { minLength: 1, maxLength: 4 }),
    )
    fc.assert(
      fc.property(block, (rows) => {
        fc.pre(rows.at(-1)!.join('') !== '')
        expect(readTsv(writeTsv(rows))).toEqual(rows)
      }),
      { seed: 4107, numRuns: 500 },
    )
  })

  test('fills from the active cell down and makes new lines for what is left', () => {
    const block = readTsv('Bracket, steel\t3 mm plate\t\t4\nPulley\t60 mm\tP60\t2x\nBearing\t6204\t\t1\tset')
    const pasted = pasteBlock(doc, ids, { row: 1, column: COLUMNS.indexOf('name') }, block, kinds, newId)
    expect(pasted).toMatchObject({ added: 1, wrong: [], beyond: 0 })
    expect(pasted.document.lines.map(({ options }) => options[0]!.part.name)).toEqual([
      'Bolt M8',
      'Bracket, steel',
      'Pulley',
      'Bearing',
    ])
    expect(pasted.document.lines[2]).toMatchObject({
      quantity: { value: '2', typed: '2x' },
      options: [{ part: { designation: 'P60' } }],
    })
    expect(pasted.document.lines[3]!.quantity).toEqual({ value: '1', unit: 'set' })
    GuideDocument.parse(pasted.document)
  })

  test('loses nothing: what a cell does not take is handed back with its reason', () => {
    const block = [['4'], ['a few'], ['6']]
    const pasted = pasteBlock(doc, ids, { row: 0, column: COLUMNS.indexOf('quantity') }, block, kinds, newId)
    expect(pasted.wrong).toEqual([{ line: ids[1], column: 'quantity', text: 'a few', why: 'no number' }])
    expect(pasted.document.lines.map((line) => line.quantity?.value)).toEqual(['4', '1', '6'])
  })

  test('a new line without a quantity in the block has none', () => {
    const pasted = pasteBlock(doc, ids, { row: 3, column: 1 }, [['Grease']], kinds, newId)
    expect(pasted.document.lines[3]!.quantity).toBeNull()
  })
})

describe('the keys of the grid', () => {
  const size = { rows: 3, columns: 4 }
  const key = (name: string, more: Partial<GridKey> = {}): GridKey => ({
    key: name,
    shiftKey: false,
    ctrlKey: false,
    altKey: false,
    metaKey: false,
    ...more,
  })
  const at = (row: number, column: number): GridState => gridAt(startOfGrid, size, row, column)
  const after = (state: GridState, ...keys: GridKey[]) =>
    keys.reduce((now, pressed) => gridKey(now, size, pressed).state, state)

  test.each([
    ['ArrowDown', {}, [2, 1]],
    ['ArrowRight', {}, [1, 2]],
    ['ArrowLeft', {}, [1, 0]],
    ['Home', {}, [1, 0]],
    ['End', {}, [1, 3]],
    ['Home', { ctrlKey: true }, [0, 0]],
    ['End', { ctrlKey: true }, [2, 3]],
    ['PageDown', {}, [2, 1]],
    ['Tab', {}, [1, 2]],
    ['Tab', { shiftKey: true }, [1, 0]],
  ] as const)('%s %o', (name, more, [row, column]) => {
    expect(after(at(1, 1), key(name, more))).toMatchObject({ row, column })
  })

  test('arrows follow the direction of writing', () => {
    expect(gridKey(at(1, 1), size, key('ArrowLeft'), true).state).toMatchObject({ column: 2 })
    expect(gridKey(at(1, 1), size, key('ArrowRight'), true).state).toMatchObject({ column: 0 })
  })

  test('Tab goes over the end of a row, and leaves the grid at its ends and after Escape', () => {
    expect(after(at(0, 3), key('Tab'))).toMatchObject({ row: 1, column: 0 })
    expect(gridKey(at(2, 3), size, key('Tab')).stop).toBe(false)
    expect(gridKey(at(0, 0), size, key('Tab', { shiftKey: true })).stop).toBe(false)
    expect(gridKey(after(at(1, 1), key('Escape')), size, key('Tab')).stop).toBe(false)
  })

  test('Shift grows a range, a plain arrow ends it', () => {
    const grown = after(at(0, 0), key('ArrowDown', { shiftKey: true }), key('ArrowRight', { shiftKey: true }))
    expect(rangeOf(grown)).toEqual({ top: 0, bottom: 1, start: 0, end: 1 })
    const ended = after(grown, key('ArrowDown'))
    expect(rangeOf(ended)).toEqual({ top: 2, bottom: 2, start: 1, end: 1 })
  })

  test('Enter and F2 open the cell as it is, a letter replaces, Delete empties, commands are left alone', () => {
    expect(gridKey(at(1, 1), size, key('Enter')).open).toBe('as it is')
    expect(gridKey(at(1, 1), size, key('F2')).open).toBe('as it is')
    expect(gridKey(at(1, 1), size, key('ق')).open).toEqual({ text: 'ق' })
    expect(gridKey(at(1, 1), size, key('Delete')).clear).toBe(true)
    expect(gridKey(at(1, 1), size, key('c', { ctrlKey: true })).stop).toBe(false)
    expect(gridKey(at(1, 1), size, key('Shift', { shiftKey: true })).stop).toBe(false)
  })

  test('while writing, Enter takes and goes down, Tab takes and goes on, Escape gives up, arrows stay in the text', () => {
    const writing: GridState = { ...at(1, 1), editing: { text: 'x' } }
    expect(gridKey(writing, size, key('Enter'))).toMatchObject({
      commit: true,
      state: { row: 2, column: 1, editing: null },
    })
    expect(gridKey(writing, size, key('Tab'))).toMatchObject({
      commit: true,
      state: { row: 1, column: 2, editing: null },
    })
    expect(gridKey(writing, size, key('Escape'))).toMatchObject({
      commit: false,
      state: { row: 1, column: 1, editing: null },
    })
    expect(gridKey(writing, size, key('ArrowLeft'))).toMatchObject({ stop: false, state: writing })
  })

  test('Alt with an arrow moves the line', () => {
    expect(gridKey(at(1, 1), size, key('ArrowUp', { altKey: true })).moveLine).toBe(-1)
  })

  test('whatever is pressed, the cursor is in the grid', () => {
    const name = fc.constantFrom(
      'ArrowUp',
      'ArrowDown',
      'ArrowLeft',
      'ArrowRight',
      'Home',
      'End',
      'Tab',
      'Enter',
      'Escape',
      'a',
      'PageUp',
    )
    const pressed = fc.record({
      key: name,
      shiftKey: fc.boolean(),
      ctrlKey: fc.boolean(),
      altKey: fc.boolean(),
      metaKey: fc.constant(false),
    })
    fc.assert(
      fc.property(fc.array(pressed, { maxLength: 30 }), fc.boolean(), (keys, rtl) => {
        const end = keys.reduce((now, each) => gridKey(now, size, each, rtl).state, startOfGrid)
        expect(end.row).toBeGreaterThanOrEqual(0)
        expect(end.row).toBeLessThan(size.rows)
        expect(end.column).toBeGreaterThanOrEqual(0)
        expect(end.column).toBeLessThan(size.columns)
      }),
      { seed: 4107 },
    )
  })
})

describe('the order of lines', () => {
  const depths = (document: GuideDocument): number[] => {
    const byId = new Map(document.lines.map((line): [string, Line] => [line.id, line]))
    return document.lines.map((line) => depthOf(byId, line))
  }

  test('a line goes into the one above, the next beside it, and out again', () => {
    const one = nestDeeper(doc, ids[1]!)
    const two = nestDeeper(one, ids[2]!)
    expect(depths(two)).toEqual([0, 1, 1])
    const three = nestDeeper(two, ids[2]!)
    expect(depths(three)).toEqual([0, 1, 2])
    expect(nestDeeper(three, ids[2]!)).toBe(three)
    expect(depths(nestOut(three, ids[2]!))).toEqual([0, 1, 1])
    expect(nestDeeper(doc, ids[0]!)).toBe(doc)
  })

  test('a line moves by one and stops at the ends', () => {
    expect(moveLine(doc, ids[0]!, 1).lines.map(({ id }) => id)).toEqual([ids[1], ids[0], ids[2]])
    expect(moveLine(doc, ids[0]!, -1)).toBe(doc)
  })
})
