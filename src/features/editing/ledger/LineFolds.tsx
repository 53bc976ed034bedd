import { useTranslation } from 'react-i18next'
import type { Reconciled } from '../../../../shared/guide/reconcile'
import { quantityText } from '../../../../shared/guide/quantityText'
import type { Line } from '../../../../shared/guide/schema'
import type { Id } from '../../../../shared/lib/ids/id'
import { PartBalloon } from '../fields/PartBalloon'
import { useDraft } from '../draftStore'
import { depthOf } from './lineOrder'
import { Standing } from './Standing'

export interface LineFoldsProps {
  lines: readonly Line[]
  balances: ReadonlyMap<Id, Reconciled>
  onOpen: (id: Id) => void
}

/** On a phone: a part a line, pressed to be edited. */
export function LineFolds({ lines, balances, onOpen }: LineFoldsProps) {
  const { t } = useTranslation('editingLedger')
  const { document } = useDraft()
  const byId = new Map(document.lines.map((line) => [line.id, line]))
  return (
    <ul className="line-folds">
      {lines.map((line) => {
        const { name, specification } = line.options[0]!.part
        const standing = balances.get(line.id)
        return (
          <li
            key={line.id}
            data-node={line.id}
            style={{ paddingInlineStart: `${depthOf(byId, line) * 18}px` }}
          >
            <button type="button" onClick={() => onOpen(line.id)}>
              <PartBalloon line={line.id} />
              <span className="words">
                <span dir="auto">{name === '' ? t('untitled') : name}</span>
                {specification !== '' && <small dir="auto">{specification}</small>}
                {standing !== undefined && (
                  <small>
                    <Standing of={standing} />
                  </small>
                )}
              </span>
              <span className="num">
                {line.quantity === null
                  ? t('asNeeded')
                  : (line.quantity.typed ?? quantityText(line.quantity))}
              </span>
            </button>
          </li>
        )
      })}
    </ul>
  )
}
