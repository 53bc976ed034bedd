import { useId, useRef, useState, type ClipboardEvent, type FocusEvent, type KeyboardEvent } from 'react'
import { useTranslation } from 'react-i18next'
import type { Reconciled } from '../../../../shared/guide/reconcile'
import type { GuideDocument, Line } from '../../../../shared/guide/schema'
import type { Id } from '../../../../shared/lib/ids/id'
import { useDraft } from '../draftStore'
import { useReorder } from '../fields/useReorder'
import { useOpenDraft } from '../frame/sessionContext'
import { cellText, COLUMNS, setCell, type Column } from './columns'
import { gridAt, gridKey, rangeOf, startOfGrid } from './grid'
import { LedgerRow } from './LedgerRow'
import { depthOf } from './lineOrder'
import { pasteBlock } from './pasteBlock'
import { readTsv, writeTsv } from './tsv'
import { useKindWords } from './useKindWords'
import type { LineActs } from './useLineActs'
import { useWrongCells, wrongCells } from './wrongCells'

export interface LedgerGridProps {
  lines: readonly Line[]
  balances: ReadonlyMap<Id, Reconciled>
  acts: LineActs
}

/** The parts list as a grid with the keys of a spreadsheet. One stop of the Tab key; see `gridKey` for the rest. */
export function LedgerGrid({ lines, balances, acts }: LedgerGridProps) {
  const { t } = useTranslation('editingLedger')
  const { document, edit, newId, readOnly, announce } = useDraft()
  const { sayDone } = useOpenDraft()
  const kinds = useKindWords()
  const wrongAt = useWrongCells()
  const grid = useRef<HTMLTableElement>(null)
  const keysId = useId()
  const [kept, setState] = useState(startOfGrid)
  const [inGrid, setInGrid] = useState(false)
  // What is being written lives here and not in the state: a key pressed in one cell must not draw all the others again.
  const written = useRef('')
  const hasModels = document.models.length > 0 || document.lines.some(({ kind }) => kind === 'printed')
  const columns: readonly Column[] = hasModels ? COLUMNS : COLUMNS.filter((column) => column !== 'model')
  const size = { rows: lines.length, columns: columns.length }
  // Lines may have gone since: the cursor is never outside.
  const state =
    kept.row < lines.length || lines.length === 0 ? kept : gridAt(kept, size, lines.length - 1, kept.column)
  const range = rangeOf(state)
  const ids = lines.map(({ id }) => id)
  const byId = new Map(document.lines.map((line) => [line.id, line]))
  const reorder = useReorder(ids, acts.moveTo)

  const focusAt = (row: number, column: number): void => {
    const id = ids[row]
    if (id === undefined) return
    const cell = grid.current?.querySelector<HTMLElement>(
      `[data-node="${CSS.escape(id)}"] [data-column="${columns[column]!}"]`,
    )
    cell?.focus({ preventScroll: true })
    cell?.scrollIntoView({ block: 'nearest', inline: 'nearest' })
  }
  const textAt = (row: number, column: Column): string => {
    const line = lines[row]
    if (line === undefined) return ''
    return wrongAt(line.id, column)?.text ?? cellText(document, line, column, kinds)
  }
  const write = (line: Id, column: Column, text: string): void => {
    // Judged on the document at hand, changed on the one that is there when it is changed.
    const outcome = setCell(document, line, column, text, kinds)
    wrongCells.change([{ line, column }], outcome.ok ? [] : [{ line, column, text, why: outcome.why }])
    if (!outcome.ok) return announce(t(`wrong.${outcome.why}`))
    edit((doc) => {
      const now = setCell(doc, line, column, text, kinds)
      return now.ok ? now.document : doc
    }, `cell:${line}:${column}`)
  }
  const clearRange = (): void => {
    const cells = lines
      .slice(range.top, range.bottom + 1)
      .flatMap(({ id }) => columns.slice(range.start, range.end + 1).map((column) => ({ line: id, column })))
      // A line always is of some kind.
      .filter(({ column }) => column !== 'kind' && column !== 'unit')
    wrongCells.change(cells, [])
    edit((doc) => cells.reduce((now, { line, column }) => cleared(now, line, column, kinds), doc))
  }

  const onKeyDown = (event: KeyboardEvent<HTMLTableElement>): void => {
    if (event.nativeEvent.isComposing) return
    const step = gridKey(state, size, event, isRightToLeft(event.currentTarget))
    if (step.commit && state.editing !== null) {
      const line = lines[state.row]
      if (line !== undefined && !readOnly) write(line.id, columns[state.column]!, written.current)
    }
    if (step.stop) {
      event.preventDefault()
      event.stopPropagation()
    }
    if (step.open !== undefined && !readOnly) {
      const text = step.open === 'as it is' ? textAt(state.row, columns[state.column]!) : step.open.text
      written.current = text
      setState({ ...step.state, editing: { text } })
      return
    }
    if (step.clear === true && !readOnly) clearRange()
    const line = lines[state.row]
    if (step.moveLine !== undefined && !readOnly && line !== undefined) {
      acts.move(line.id, step.moveLine)
      if (acts.canMove) {
        const moved = gridAt(step.state, size, state.row + step.moveLine, state.column)
        setState(moved)
        setTimeout(() => focusAt(moved.row, moved.column))
      }
      return
    }
    setState(step.state)
    if (step.stop) setTimeout(() => focusAt(step.state.row, step.state.column))
  }

  const onCopy = (event: ClipboardEvent, cut: boolean): void => {
    if (state.editing !== null || lines.length === 0) return
    event.preventDefault()
    const rows = Array.from({ length: range.bottom - range.top + 1 }, (_, row) =>
      columns.slice(range.start, range.end + 1).map((column) => textAt(range.top + row, column)),
    )
    event.clipboardData.setData('text/plain', writeTsv(rows))
    announce(t('copied', { count: rows.length * rows[0]!.length }))
    if (cut && !readOnly) clearRange()
  }

  const onPaste = (event: ClipboardEvent): void => {
    if (state.editing !== null || readOnly) return
    const text = event.clipboardData.getData('text/plain')
    if (text === '') return
    event.preventDefault()
    event.stopPropagation()
    const read = readTsv(text)
    const single = read.length === 1 && read[0]!.length === 1
    // One cell fills the whole range, a block begins at its first cell.
    const block = single
      ? Array.from({ length: range.bottom - range.top + 1 }, () =>
          Array.from({ length: range.end - range.start + 1 }, () => read[0]![0]!),
        )
      : read
    const at = { row: range.top, column: range.start }
    // The same ids each time the change is applied.
    const drawn = block.flatMap(() => [newId(), newId()])
    const paste = (doc: GuideDocument) => {
      const rest = [...drawn]
      return pasteBlock(doc, ids, at, block, kinds, () => rest.shift()!, columns)
    }
    const { wrong, tried, added, beyond } = paste(document)
    wrongCells.change(tried, wrong)
    edit((doc) => paste(doc).document)
    const said = [
      t('pasted.rows', { count: block.length }),
      added > 0 ? t('pasted.added', { count: added }) : '',
      wrong.length > 0 ? t('pasted.wrong', { count: wrong.length }) : '',
      beyond > 0 ? t('pasted.beyond', { count: beyond }) : '',
    ]
    sayDone(said.filter(Boolean).join(' '))
    const last = {
      row: at.row + block.length - 1,
      column: at.column + Math.max(...block.map((row) => row.length)) - 1,
    }
    const grown = { rows: lines.length + added, columns: size.columns }
    setState({ ...gridAt(state, grown, last.row, last.column), anchor: at })
  }

  const onFocus = (event: FocusEvent): void => {
    setInGrid(true)
    const cell = event.target instanceof Element ? event.target.closest('[data-column]') : null
    const row = ids.indexOf(cell?.closest('[data-node]')?.getAttribute('data-node') ?? '')
    const column = columns.indexOf(cell?.getAttribute('data-column') as Column)
    if (row === -1 || column === -1 || (row === state.row && column === state.column)) return
    if (state.editing === null) setState(gridAt(state, size, row, column))
  }
  const onBlur = (event: FocusEvent<HTMLTableElement>): void => {
    if (event.currentTarget.contains(event.relatedTarget)) return
    setInGrid(false)
    // What is being written is taken when one goes elsewhere.
    const line = lines[state.row]
    if (state.editing !== null && line !== undefined) write(line.id, columns[state.column]!, written.current)
    setState({ ...state, editing: null, leaving: false })
  }

  if (lines.length === 0) return null
  return (
    <div className="ledger-scroll">
      <table
        ref={grid}
        role="grid"
        className="ledger parts-grid"
        aria-label={t('grid')}
        aria-describedby={readOnly ? undefined : keysId}
        aria-rowcount={lines.length + 1}
        aria-multiselectable
        aria-readonly={readOnly || undefined}
        onKeyDown={onKeyDown}
        onCopy={(event) => onCopy(event, false)}
        onCut={(event) => onCopy(event, true)}
        onPaste={onPaste}
        onFocus={onFocus}
        onBlur={onBlur}
      >
        <thead>
          <tr aria-rowindex={1}>
            <th scope="col" className="of-balloon">
              <span className="visually-hidden">{t('column.balloon')}</span>
            </th>
            {columns.map((column) => (
              <th key={column} scope="col" className={`of-${column}`}>
                {t(`column.${column}`)}
              </th>
            ))}
            <th scope="col" className="of-balance">
              {t('column.balance')}
            </th>
            <th scope="col" className="of-acts">
              <span className="visually-hidden">{t('column.acts')}</span>
            </th>
          </tr>
        </thead>
        <tbody>
          {lines.map((line, row) => (
            <LedgerRow
              key={line.id}
              line={line}
              row={row}
              columns={columns}
              depth={depthOf(byId, line)}
              standing={balances.get(line.id)}
              kinds={kinds}
              cursor={state.row === row ? state.column : null}
              chosen={inGrid && row >= range.top && row <= range.bottom ? [range.start, range.end] : null}
              editing={state.row === row ? state.editing : null}
              wrongAt={wrongAt}
              acts={acts}
              reorder={reorder}
              onWrite={(text) => {
                written.current = text
              }}
              onTake={(text) => {
                write(line.id, columns[state.column]!, text)
                setState({ ...state, editing: null })
                setTimeout(() => focusAt(row, state.column))
              }}
              onPress={(column, extend) => {
                if (state.editing !== null && !(row === state.row && column === state.column)) {
                  const before = lines[state.row]
                  if (before !== undefined) write(before.id, columns[state.column]!, written.current)
                }
                setState(gridAt(state, size, row, column, extend))
              }}
              onOpen={(column) => {
                if (readOnly) return
                written.current = textAt(row, columns[column]!)
                setState({ ...gridAt(state, size, row, column), editing: { text: written.current } })
              }}
            />
          ))}
        </tbody>
      </table>
      {!readOnly && (
        <p className="note grid-keys" id={keysId}>
          {t('keys')}
        </p>
      )}
    </div>
  )
}

const isRightToLeft = (element: Element): boolean => getComputedStyle(element).direction === 'rtl'

function cleared(
  doc: GuideDocument,
  line: Id,
  column: Column,
  kinds: ReturnType<typeof useKindWords>,
): GuideDocument {
  const outcome = setCell(doc, line, column, '', kinds)
  return outcome.ok ? outcome.document : doc
}
