// @vitest-environment happy-dom
import { act, cleanup, fireEvent, render, screen, within } from '@testing-library/react'
import { afterEach, beforeEach, expect, test, vi } from 'vitest'
import { emptyDocument } from '../../../../shared/guide/emptyDocument'
import { setNode } from '../../../../shared/guide/edit'
import type { GuideDocument } from '../../../../shared/guide/schema'
import { newId } from '../state/newId'
import { newLine } from '../step/newLine'
import { DraftForTests } from '../testing/DraftForTests'
import { PartsLedger } from './PartsLedger'

const lines = ['Bolt M8', 'Bracket'].map((name) => newLine(newId, name))
const start = { ...emptyDocument(newId, { lang: 'en', title: 'A pump' }), lines }
const step = start.sections[0]!.steps[0]!
const used = setNode(start, 'step', step.id, {
  uses: [{ id: newId(), line: lines[0]!.id, quantity: { value: '4', unit: 'each' } }],
})

let now: GuideDocument = used
const show = (document = used) => {
  now = document
  render(
    <DraftForTests document={document} onDocument={(next) => (now = next)}>
      <PartsLedger />
    </DraftForTests>,
  )
}
const cell = (row: number, column: string): HTMLElement =>
  screen.getAllByRole('row')[row]!.querySelector<HTMLElement>(`[data-column="${column}"]`)!
/** The grid moves the focus after React has drawn. */
const key = (name: string, more = {}) => {
  act(() => {
    fireEvent.keyDown(document.activeElement!, { key: name, ...more })
    vi.runAllTimers()
  })
}

beforeEach(() => {
  vi.useFakeTimers()
  vi.stubGlobal('matchMedia', () => ({
    matches: false,
    addEventListener: () => undefined,
    removeEventListener: () => undefined,
  }))
})
afterEach(() => {
  cleanup()
  vi.useRealTimers()
  vi.unstubAllGlobals()
})

test('a grid with one stop of the Tab key', () => {
  show()
  const grid = screen.getByRole('grid', { name: 'Parts list' })
  expect(
    within(grid)
      .getAllByRole('gridcell')
      .filter((each) => each.tabIndex === 0),
  ).toHaveLength(1)
})

test('a cell is written by keyboard, and Enter goes down', () => {
  show()
  act(() => cell(1, 'quantity').focus())
  key('Enter')
  fireEvent.change(screen.getByRole('textbox', { name: 'Quantity' }), { target: { value: '1/2 in' } })
  key('Enter')
  expect(now.lines[0]!.quantity).toEqual({ value: '0.5', unit: 'in', typed: '1/2 in' })
  expect(document.activeElement).toBe(cell(2, 'quantity'))
})

test('Escape gives up what was written', () => {
  show()
  act(() => cell(1, 'name').focus())
  key('X')
  expect(screen.getByRole<HTMLInputElement>('textbox', { name: 'Part' }).value).toBe('X')
  key('Escape')
  expect(now).toBe(used)
  expect(cell(1, 'name').textContent).toContain('Bolt M8')
})

test('what does not fit stays in its cell with the reason, and the document is as it was', () => {
  show()
  act(() => cell(2, 'quantity').focus())
  key('Enter')
  fireEvent.change(screen.getByRole('textbox', { name: 'Quantity' }), { target: { value: 'a few' } })
  key('Enter')
  expect(cell(2, 'quantity').getAttribute('aria-invalid')).toBe('true')
  expect(cell(2, 'quantity').textContent).toMatch(/^a fewWrite a number/)
  expect(now.lines[1]!.quantity).toEqual({ value: '1', unit: 'each' })
  act(() => cell(2, 'quantity').focus())
  key('Delete')
  expect(cell(2, 'quantity').getAttribute('aria-invalid')).toBeNull()
})

test('a block is pasted from the cell on, with new lines for the rest', () => {
  show()
  act(() => cell(2, 'name').focus())
  fireEvent.paste(document.activeElement!, {
    clipboardData: { getData: () => 'Bracket, steel\nPulley', files: [], types: ['text/plain'] },
  })
  expect(now.lines.map(({ options }) => options[0]!.part.name)).toEqual([
    'Bolt M8',
    'Bracket, steel',
    'Pulley',
  ])
  expect(screen.getByTestId('said').textContent).toBe('2 rows pasted. One line is new.')
})

test('a quantity is taken from the steps', () => {
  show()
  expect(screen.getByText('4 used, 1 listed')).toBeTruthy()
  fireEvent.click(screen.getByRole('button', { name: 'Take the quantity of Bolt M8 from the steps' }))
  expect(now.lines[0]!.quantity).toEqual({ value: '4', unit: 'each' })
  expect(screen.getByText('4 of 4 used')).toBeTruthy()
})

test('Alt and an arrow move a line, and finding narrows the list', () => {
  show()
  act(() => cell(1, 'name').focus())
  key('ArrowDown', { altKey: true })
  expect(now.lines.map(({ id }) => id)).toEqual([lines[1]!.id, lines[0]!.id])
  fireEvent.change(screen.getByRole('searchbox', { name: 'Find in the list' }), { target: { value: 'bolt' } })
  expect(screen.getAllByRole('row')).toHaveLength(2)
})

test('an empty list says what to do', () => {
  show(start.lines.length > 0 ? { ...start, lines: [] } : start)
  expect(screen.getByText(/No parts yet/)).toBeTruthy()
  fireEvent.click(screen.getByRole('button', { name: 'New line' }))
  expect(now.lines).toHaveLength(1)
})
