import { useMemo, useState } from 'react'
import { useTranslation } from 'react-i18next'
import { Plus } from 'lucide-react'
import { insertNode } from '../../../../shared/guide/edit'
import { takeFromSteps } from '../../../../shared/guide/reconcile'
import type { Id } from '../../../../shared/lib/ids/id'
import { Button } from '../../../components/controls/Button'
import { EmptyState } from '../../../components/controls/EmptyState'
import { Select } from '../../../components/controls/Select'
import { TextField } from '../../../components/controls/TextField'
import { useDraft } from '../draftStore'
import { useOpenDraft } from '../frame/sessionContext'
import { newLine } from '../step/newLine'
import { balancesOf, choicesFor } from './balances'
import { LedgerGrid } from './LedgerGrid'
import { LineFolds } from './LineFolds'
import { LineSheet } from './LineSheet'
import { isOff, isWhole, shownLines, type Order, type View } from './shownLines'
import { useLineActs } from './useLineActs'
import { useNarrow } from './useNarrow'
import './ledger.css'

const ORDERS: readonly Order[] = ['listed', 'name', 'kind', 'balance']

/** The parts list as a ledger: a grid on a desk, a line each with a sheet to edit it on a phone. */
export function PartsLedger() {
  const { t } = useTranslation('editingLedger')
  const { document, choices, numbers, edit, newId, readOnly } = useDraft()
  const { sayDone } = useOpenDraft()
  const narrow = useNarrow()
  const [view, setView] = useState<View>({ words: '', order: 'listed' })
  const [sheet, setSheet] = useState<Id | null>(null)
  const balances = useMemo(() => balancesOf(document, choices), [document, choices])
  const shown = useMemo(
    () => shownLines(document, view, balances, numbers.line),
    [document, view, balances, numbers],
  )
  const off = [...balances.values()].filter(isOff)
  const canTake = off.filter(({ balance }) => ['more used', 'more listed', 'no quantity'].includes(balance))
  const acts = useLineActs(isWhole(view), setSheet)

  const addLine = (): void => {
    const line = newLine(newId, '')
    setView({ words: '', order: 'listed' })
    edit((doc) => insertNode(doc, 'line', line, null))
    if (narrow) setSheet(line.id)
    else setTimeout(() => acts.focusName(line.id))
  }
  const takeAll = (): void => {
    edit((doc) =>
      canTake.reduce((now, { line }) => takeFromSteps(now, line, choicesFor(now, line, choices)), doc),
    )
    sayDone(t('take.allDone', { count: canTake.length }))
  }
  if (document.lines.length === 0 && readOnly) return <p className="note">{t('empty.readOnly')}</p>
  return (
    <div className="parts-ledger" data-field="lines">
      {document.lines.length > 0 && (
        <div className="ledger-tools" data-own-undo>
          <TextField
            type="search"
            label={t('find.label')}
            value={view.words}
            onChange={(event) => setView({ ...view, words: event.target.value })}
          />
          <Select
            label={t('order.label')}
            value={view.order}
            options={ORDERS.map((order) => ({ value: order, label: t(`order.${order}`) }))}
            onChange={(event) => setView({ ...view, order: event.target.value as Order })}
          />
          {!readOnly && canTake.length > 0 && (
            <Button onClick={takeAll}>{t('take.all', { count: canTake.length })}</Button>
          )}
        </div>
      )}
      {narrow ? (
        <LineFolds lines={shown} balances={balances} onOpen={setSheet} />
      ) : (
        <LedgerGrid lines={shown} balances={balances} acts={acts} />
      )}
      {document.lines.length === 0 && <EmptyState>{t('empty.hint')}</EmptyState>}
      {document.lines.length > 0 && shown.length === 0 && <p className="note">{t('find.none')}</p>}
      <div className="ledger-foot">
        {!readOnly && (
          <div data-field="add-line">
            <Button onClick={addLine}>
              <Plus size={16} aria-hidden />
              {t('add')}
            </Button>
          </div>
        )}
        {document.lines.length > 0 && (
          <p className="ledger-total" role="status">
            <b>{t('total.lines', { count: document.lines.length })}</b>{' '}
            {off.length === 0 ? (
              <span className="lichen">{t('total.even')}</span>
            ) : (
              <span className="oxide">{t('total.off', { count: off.length })}</span>
            )}
          </p>
        )}
      </div>
      {sheet !== null && (
        <LineSheet lineId={sheet} onClose={() => setSheet(null)} acts={acts} balance={balances.get(sheet)} />
      )}
    </div>
  )
}
