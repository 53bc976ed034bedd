import type { MouseEvent } from 'react'
import { useTranslation } from 'react-i18next'
import { GripVertical, MoreVertical } from 'lucide-react'
import type { Reconciled } from '../../../../shared/guide/reconcile'
import type { Line } from '../../../../shared/guide/schema'
import type { Id } from '../../../../shared/lib/ids/id'
import { Button } from '../../../components/controls/Button'
import { Menu } from '../../../components/controls/Menu'
import { useDraft } from '../draftStore'
import { PartBalloon } from '../fields/PartBalloon'
import { useUnitWord } from '../fields/useUnitWord'
import type { Reorder } from '../fields/useReorder'
import { CellInput } from './CellInput'
import { cellText, type Column, type KindWords } from './columns'
import type { WrongCell } from './pasteBlock'
import { useConditionSentence } from '../step/useConditionSentence'
import { Standing } from './Standing'
import type { LineActs } from './useLineActs'

export interface LedgerRowProps {
  line: Line
  row: number
  columns: readonly Column[]
  depth: number
  standing: Reconciled | undefined
  kinds: KindWords
  /** The column of the cursor, where it is in this row. */
  cursor: number | null
  /** First and last column of the range, where it goes over this row. */
  chosen: readonly [number, number] | null
  editing: { text: string } | null
  wrongAt: (line: Id, column: Column) => WrongCell | undefined
  acts: LineActs
  reorder: Reorder
  onWrite: (text: string) => void
  /** Takes a value at once: one that was chosen from a list. */
  onTake: (text: string) => void
  onPress: (column: number, extend: boolean) => void
  onOpen: (column: number) => void
}

/** A line of the list. */
export function LedgerRow(props: LedgerRowProps) {
  const { line, row, columns, depth, standing, acts, reorder } = props
  const { t } = useTranslation('editingLedger')
  const { readOnly, numbers } = useDraft()
  const condition = useConditionSentence()
  const { name } = line.options[0]!.part
  const said = name === '' ? t('untitled') : name
  const off = standing !== undefined && ['more used', 'more listed', 'no quantity'].includes(standing.balance)
  return (
    <tr data-node={line.id} aria-rowindex={row + 2} {...reorder.row(line.id)}>
      <th scope="row" className="of-balloon">
        {!readOnly && acts.canMove && (
          <span className="line-grip" title={t('move.drag')} {...reorder.grip(line.id)}>
            <GripVertical size={16} />
          </span>
        )}
        <PartBalloon line={line.id} />
      </th>
      {columns.map((column, index) => (
        <Cell key={column} {...props} column={column} index={index} indent={column === 'name' ? depth : 0} />
      ))}
      <td className="of-balance">
        {standing !== undefined && <Standing of={standing} />}
        {line.when !== undefined && line.when.length > 0 && <small dir="auto">{condition(line.when)}</small>}
        {standing !== undefined && standing.steps.length > 0 && (
          <small>
            {t('inSteps', {
              steps: standing.steps.map((id) => numbers.step[id]).join(', '),
              count: standing.steps.length,
            })}
          </small>
        )}
        {off && !readOnly && (
          <Button
            kind="quiet"
            className="take"
            aria-label={t('take.of', { name: said })}
            onClick={() => acts.take(line.id)}
          >
            {t('take.one')}
          </Button>
        )}
      </td>
      <td className="of-acts">
        {!readOnly && (
          <Menu
            kind="quiet"
            label={t('acts.of', { name: said })}
            actions={[
              {
                id: 'sheet',
                label: t('acts.sheet', { count: line.options.length - 1 }),
                onAction: () => acts.openSheet(line.id),
              },
              { id: 'below', label: t('acts.below'), onAction: () => acts.addBelow(line.id) },
              {
                id: 'up',
                label: t('acts.up'),
                disabled: !acts.canMove,
                onAction: () => acts.move(line.id, -1),
              },
              {
                id: 'down',
                label: t('acts.down'),
                disabled: !acts.canMove,
                onAction: () => acts.move(line.id, 1),
              },
              { id: 'in', label: t('acts.nest'), onAction: () => acts.nest(line.id, true) },
              {
                id: 'out',
                label: t('acts.nestOut'),
                disabled: line.within === undefined,
                onAction: () => acts.nest(line.id, false),
              },
              { id: 'remove', label: t('acts.remove'), onAction: () => acts.remove(line.id) },
            ]}
          >
            <MoreVertical size={16} aria-hidden />
          </Menu>
        )}
      </td>
    </tr>
  )
}

interface CellProps extends LedgerRowProps {
  column: Column
  index: number
  indent: number
}

function Cell({ line, column, index, indent, kinds, cursor, chosen, editing, wrongAt, ...on }: CellProps) {
  const { t } = useTranslation('editingLedger')
  const { document } = useDraft()
  const unitWord = useUnitWord()
  const isCursor = cursor === index
  const wrong = wrongAt(line.id, column)
  const errorId = `wrong-${line.id}-${column}`
  const text = cellText(document, line, column, kinds)
  const inRange = chosen !== null && index >= chosen[0] && index <= chosen[1]
  if (isCursor && editing !== null) {
    return (
      <td
        role="gridcell"
        className={`cell of-${column} writing`}
        data-column={column}
        data-field={column}
        aria-selected
      >
        <CellInput
          column={column}
          line={line}
          kinds={kinds}
          text={editing.text}
          onWrite={on.onWrite}
          onTake={on.onTake}
          errorId={wrong === undefined ? undefined : errorId}
        />
        {wrong !== undefined && (
          <small className="field-error" id={errorId}>
            {t(`wrong.${wrong.why}`)}
          </small>
        )}
      </td>
    )
  }
  const press = (event: MouseEvent): void => on.onPress(index, event.shiftKey)
  const shown =
    wrong?.text ?? (column === 'unit' && line.quantity !== null ? unitWord(line.quantity.unit) : text)
  const nothing = emptySays(line, column)
  return (
    <td
      role="gridcell"
      className={['cell', `of-${column}`, inRange && 'in-range', wrong && 'wrong'].filter(Boolean).join(' ')}
      data-column={column}
      data-field={column}
      tabIndex={isCursor ? 0 : -1}
      aria-selected={inRange}
      aria-invalid={wrong === undefined ? undefined : true}
      aria-describedby={wrong === undefined ? undefined : errorId}
      onMouseDown={press}
      onDoubleClick={() => on.onOpen(index)}
      style={indent > 0 ? { paddingInlineStart: `${4.5 + indent * 18}px` } : undefined}
    >
      <span dir="auto" className={column === 'name' ? 'name' : undefined}>
        {shown === '' && nothing !== null ? <span className="graphite">{t(nothing)}</span> : shown}
      </span>
      {column === 'name' && line.options.length > 1 && (
        <small>{t('substitutes', { count: line.options.length - 1 })}</small>
      )}
      {wrong !== undefined && (
        <small className="field-error" id={errorId}>
          {t(`wrong.${wrong.why}`)}
        </small>
      )}
    </td>
  )
}

/** What an empty cell means, where that must be said. */
function emptySays({ kind, quantity }: Line, column: Column): 'asNeeded' | 'noModel' | null {
  if (column === 'quantity' && quantity === null) return 'asNeeded'
  return column === 'model' && kind === 'printed' ? 'noModel' : null
}
