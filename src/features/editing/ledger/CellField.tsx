import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import type { Line } from '../../../../shared/guide/schema'
import { TextField } from '../../../components/controls/TextField'
import { useDraft } from '../draftStore'
import { cellText, setCell, type Column, type KindWords } from './columns'
import { useWrongCells, wrongCells } from './wrongCells'

export interface CellFieldProps {
  line: Line
  column: Column
  kinds: KindWords
  description?: string
}

/** A cell of the ledger as a field: the same text, the same rules. It is taken when one leaves the field, since "1" is on the way to "1/2". */
export function CellField({ line, column, kinds, description }: CellFieldProps) {
  const { t } = useTranslation('editingLedger')
  const { document, edit, readOnly } = useDraft()
  const wrong = useWrongCells()(line.id, column)
  const [typed, setTyped] = useState<string | null>(null)
  const shown = typed ?? wrong?.text ?? cellText(document, line, column, kinds)
  const take = (): void => {
    if (typed === null) return
    setTyped(null)
    const outcome = setCell(document, line.id, column, typed, kinds)
    wrongCells.change(
      [{ line: line.id, column }],
      outcome.ok ? [] : [{ line: line.id, column, text: typed, why: outcome.why }],
    )
    if (!outcome.ok) return
    edit((doc) => {
      const now = setCell(doc, line.id, column, typed, kinds)
      return now.ok ? now.document : doc
    })
  }
  return (
    <TextField
      label={t(`column.${column}`)}
      description={description}
      dir="auto"
      readOnly={readOnly}
      placeholder={column === 'quantity' ? t('asNeeded') : undefined}
      value={shown}
      error={wrong === undefined || typed !== null ? undefined : t(`wrong.${wrong.why}`)}
      onChange={(event) => setTyped(event.target.value)}
      onBlur={take}
      onKeyDown={(event) => event.key === 'Enter' && take()}
    />
  )
}
