/** Where one is in the grid. `anchor` is the other corner of the range; `editing` is what is being written in the cell. */
export interface GridState {
  row: number
  column: number
  anchor: { row: number; column: number }
  editing: { text: string } | null
  /** Escape was pressed while moving: the next Tab leaves the grid. */
  leaving: boolean
}

export interface GridSize {
  rows: number
  columns: number
}

/** What a key does. `stop`: the key was the grid's, and the browser must not act on it. */
export interface GridStep {
  state: GridState
  /** The text written in the cell is to be taken. */
  commit: boolean
  stop: boolean
  /** The cell under the cursor is to be opened for writing: with this text, or with what it holds. */
  open?: { text: string } | 'as it is'
  clear?: boolean
  moveLine?: -1 | 1
}

export interface GridKey {
  key: string
  shiftKey: boolean
  ctrlKey: boolean
  altKey: boolean
  metaKey: boolean
}

export const startOfGrid: GridState = {
  row: 0,
  column: 0,
  anchor: { row: 0, column: 0 },
  editing: null,
  leaving: false,
}

const PAGE = 10

const clamp = (value: number, count: number): number => Math.max(0, Math.min(value, count - 1))

/** The grid at a cell, within its bounds; with `extend` the range grows to it. */
export function gridAt(
  state: GridState,
  size: GridSize,
  row: number,
  column: number,
  extend = false,
): GridState {
  const at = { row: clamp(row, size.rows), column: clamp(column, size.columns) }
  return { ...at, anchor: extend ? state.anchor : at, editing: null, leaving: false }
}

/** The cells between cursor and anchor, both included. */
export function rangeOf({ row, column, anchor }: GridState): {
  top: number
  bottom: number
  start: number
  end: number
} {
  return {
    top: Math.min(row, anchor.row),
    bottom: Math.max(row, anchor.row),
    start: Math.min(column, anchor.column),
    end: Math.max(column, anchor.column),
  }
}

/**
 * What a key does, as in a spreadsheet: arrows, Home, End and with Ctrl to the corners, Page Up and Down; Shift with an arrow grows the range; Enter or F2
 * opens the cell, a letter replaces what it holds, Delete empties the range; Tab goes on, over the end of a row into the next, and leaves
 * the grid at its last cell, or anywhere after Escape. While writing, Enter takes the text and goes down, Tab takes it and goes on,
 * Escape gives it up. Alt with an arrow moves the whole line. "Forward" is the direction of writing, so arrows turn round in right-to-left.
 */
export function gridKey(state: GridState, size: GridSize, key: GridKey, rightToLeft = false): GridStep {
  return state.editing === null ? whileMoving(state, size, key, rightToLeft) : whileWriting(state, size, key)
}

const nothing = (state: GridState): GridStep => ({ state, commit: false, stop: false })
const went = (state: GridState): GridStep => ({ state, commit: false, stop: true })

function whileWriting(state: GridState, size: GridSize, { key, shiftKey, altKey }: GridKey): GridStep {
  switch (key) {
    case 'Escape':
      return went({ ...state, editing: null })
    case 'Enter': {
      if (altKey) return nothing(state)
      return { ...went(gridAt(state, size, state.row + (shiftKey ? -1 : 1), state.column)), commit: true }
    }
    case 'Tab': {
      const next = alongRow(state, size, shiftKey ? -1 : 1)
      return { ...went(next ?? { ...state, editing: null }), commit: true }
    }
    default:
      return nothing(state)
  }
}

/** The cell before or after in reading order; undefined past the ends. */
function alongRow(state: GridState, size: GridSize, by: -1 | 1): GridState | undefined {
  const index = state.row * size.columns + state.column + by
  if (index < 0 || index >= size.rows * size.columns) return undefined
  return gridAt(state, size, Math.floor(index / size.columns), index % size.columns)
}

function whileMoving(state: GridState, size: GridSize, pressed: GridKey, rightToLeft: boolean): GridStep {
  const { key, shiftKey, altKey } = pressed
  const ctrlKey = pressed.ctrlKey || pressed.metaKey
  const { row, column } = state
  if (altKey) {
    return key === 'ArrowUp' || key === 'ArrowDown'
      ? { ...went(state), moveLine: key === 'ArrowUp' ? -1 : 1 }
      : nothing(state)
  }
  const forward = rightToLeft ? -1 : 1
  const go = (toRow: number, toColumn: number, extend = shiftKey): GridStep =>
    went(gridAt(state, size, toRow, toColumn, extend))
  switch (key) {
    case 'ArrowUp':
      return go(ctrlKey ? 0 : row - 1, column)
    case 'ArrowDown':
      return go(ctrlKey ? size.rows - 1 : row + 1, column)
    case 'ArrowLeft':
      return go(row, ctrlKey ? (rightToLeft ? size.columns - 1 : 0) : column - forward)
    case 'ArrowRight':
      return go(row, ctrlKey ? (rightToLeft ? 0 : size.columns - 1) : column + forward)
    case 'Home':
      return go(ctrlKey ? 0 : row, 0)
    case 'End':
      return go(ctrlKey ? size.rows - 1 : row, size.columns - 1)
    case 'PageUp':
      return go(row - PAGE, column)
    case 'PageDown':
      return go(row + PAGE, column)
    case 'Tab': {
      if (state.leaving) return nothing({ ...state, leaving: false })
      const next = alongRow(state, size, shiftKey ? -1 : 1)
      return next === undefined ? nothing(state) : went(next)
    }
    case 'Escape':
      return went({ ...state, anchor: { row, column }, leaving: true })
    case 'Enter':
    case 'F2':
      return { ...went(state), open: 'as it is' }
    case 'Delete':
    case 'Backspace':
      return { ...went(state), clear: true }
    case 'a':
      if (ctrlKey) {
        const all = { row: size.rows - 1, column: size.columns - 1 }
        return went({ ...state, ...all, anchor: { row: 0, column: 0 }, leaving: false })
      }
  }
  // One character is what a printing key says; with Ctrl it is a command of the browser's or the page's.
  if ([...key].length === 1 && !ctrlKey) return { ...went(state), open: { text: key === ' ' ? '' : key } }
  return nothing(state)
}
