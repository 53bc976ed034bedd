import { useSyncExternalStore } from 'react'
import type { Id } from '../../../../shared/lib/ids/id'
import type { Column } from './columns'
import type { WrongCell } from './pasteBlock'

type Cells = ReadonlyMap<string, WrongCell>

const keyOf = (line: Id, column: Column): string => `${line} ${column}`

/**
 * What was written into cells and does not fit the document, by line and column. It lives as long as the page is loaded, so that going to another place of
 * the draft and back loses nothing. Ids are of one line in one guide, so guides do not mix.
 */
class WrongCells {
  private cells: Cells = new Map()
  private readonly watchers = new Set<() => void>()

  readonly watch = (watcher: () => void): (() => void) => {
    this.watchers.add(watcher)
    return () => this.watchers.delete(watcher)
  }
  readonly look = (): Cells => this.cells

  change(tried: readonly { line: Id; column: Column }[], wrong: readonly WrongCell[]): void {
    const cells = new Map(this.cells)
    for (const { line, column } of tried) cells.delete(keyOf(line, column))
    for (const cell of wrong) cells.set(keyOf(cell.line, cell.column), cell)
    this.cells = cells
    for (const watcher of this.watchers) watcher()
  }
}

export const wrongCells = new WrongCells()

export function useWrongCells(): (line: Id, column: Column) => WrongCell | undefined {
  const cells = useSyncExternalStore(wrongCells.watch, wrongCells.look)
  return (line, column) => cells.get(keyOf(line, column))
}
