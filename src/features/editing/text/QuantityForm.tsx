import { useState, type FormEvent } from 'react'
import { Dialog as AriaDialog, Popover } from 'react-aria-components'
import { useTranslation } from 'react-i18next'
import { parseMeasure, type QuantityTrouble } from '../../../../shared/guide/parseQuantity'
import type { Measure } from '../../../../shared/guide/schema'
import type { UnitCode } from '../../../../shared/lib/units/units'
import { Button } from '../../../components/controls/Button'
import { TextField } from '../../../components/controls/TextField'
import { UnitSelect } from '../fields/UnitSelect'

export interface QuantityFormProps {
  anchor: Element
  measure: Measure | null
  onDone: (measure: Measure) => void
  onRemove?: () => void
  onClose: () => void
}

/** A number with its unit, in a small box beside its place. A unit typed behind the number counts. */
export function QuantityForm({ anchor, measure, onDone, onRemove, onClose }: QuantityFormProps) {
  const { t } = useTranslation('editingText')
  const [typed, setTyped] = useState(measure?.typed ?? measure?.value ?? '')
  const [unit, setUnit] = useState<UnitCode>(measure?.unit ?? 'mm')
  const [trouble, setTrouble] = useState<QuantityTrouble | null>(null)
  const submit = (event: FormEvent): void => {
    event.preventDefault()
    event.stopPropagation()
    const parsed = parseMeasure(typed, unit)
    if (parsed.ok) onDone(parsed.measure)
    else setTrouble(parsed.why)
  }
  return (
    <Popover
      className="popover text-form"
      isOpen
      triggerRef={{ current: anchor }}
      onOpenChange={(open) => !open && onClose()}
      placement="bottom start"
    >
      <AriaDialog aria-label={t('number.title')} className="dialog-box">
        <form onSubmit={submit} data-own-undo>
          <div className="value-and-unit">
            <TextField
              autoFocus
              label={t('number.value')}
              value={typed}
              dir="ltr"
              inputMode="text"
              error={trouble === null ? undefined : t(`trouble.${trouble}`)}
              onChange={(event) => {
                setTyped(event.target.value)
                setTrouble(null)
              }}
            />
            <UnitSelect label={t('number.unit')} value={unit} onChange={setUnit} />
          </div>
          <div className="actions">
            <Button kind="go" type="submit">
              {t(measure === null ? 'number.put' : 'number.keep')}
            </Button>
            {onRemove !== undefined && <Button onClick={onRemove}>{t('number.remove')}</Button>}
          </div>
        </form>
      </AriaDialog>
    </Popover>
  )
}
