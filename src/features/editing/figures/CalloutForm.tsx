import { useEffect, useRef, useState } from 'react'
import { Dialog as AriaDialog, Popover } from 'react-aria-components'
import { useTranslation } from 'react-i18next'
import { parseMeasure } from '../../../../shared/guide/parseQuantity'
import type { Callout, Measure } from '../../../../shared/guide/schema'
import { Button } from '../../../components/controls/Button'
import { TextField } from '../../../components/controls/TextField'
import { useDraft } from '../draftStore'
import { ChooseByName } from '../fields/ChooseByName'
import { GuideText } from '../fields/GuideText'
import { PartBalloon } from '../fields/PartBalloon'
import { UnitSelect } from '../fields/UnitSelect'
import { droppedOn } from './places'
import { useCalloutName } from './useCalloutName'

export interface CalloutFormProps {
  callout: Callout
  anchor: Element
  onSet: (patch: Partial<Callout>, field: string) => void
  onRemove: () => void
  onClose: () => void
}

/** What a callout says and points at, in a small box beside it. */
export function CalloutForm({ callout, anchor, onSet, onRemove, onClose }: CalloutFormProps) {
  const { t } = useTranslation('editingFigures')
  const { document } = useDraft()
  const nameOf = useCalloutName()
  const fields = useRef<HTMLDivElement>(null)
  const { shape } = callout
  useEffect(() => {
    // A part was chosen before; of the others the first thing is to say what they mean.
    if (shape === 'balloon') return
    const first = fields.current?.querySelector<HTMLInputElement | HTMLTextAreaElement>('input, textarea')
    first?.focus()
    first?.select()
  }, [shape])
  return (
    <Popover
      className="popover callout-form"
      isOpen
      triggerRef={{ current: anchor }}
      onOpenChange={(open) => !open && onClose()}
      placement="bottom"
    >
      <AriaDialog aria-label={nameOf(callout)} className="dialog-box">
        <div className="callout-fields" ref={fields}>
          {callout.shape === 'balloon' && (
            <ChooseByName
              label={t('form.part')}
              value={callout.line}
              items={document.lines.map((line) => ({
                id: line.id,
                text: line.options[0]!.part.name,
                content: (
                  <span className="choice-of-line">
                    <PartBalloon line={line.id} />
                    <span dir="auto">{line.options[0]!.part.name}</span>
                  </span>
                ),
              }))}
              onChange={(line) => onSet({ line }, 'line')}
            />
          )}
          {callout.shape === 'dimension' && (
            <MeasureFields measure={callout.value} onChange={(value) => onSet({ value }, 'value')} />
          )}
          <GuideText
            label={t('form.text')}
            optional={callout.shape !== 'arrow'}
            value={callout.text ?? ''}
            onChange={(text) => onSet({ text: text === '' ? undefined : text }, 'text')}
          />
        </div>
        <div className="actions">
          <Button kind="go" onClick={onClose}>
            {t('form.done')}
          </Button>
          {(callout.shape === 'balloon' || callout.shape === 'arrow') && (
            <Button
              onClick={() =>
                onSet(
                  {
                    tip:
                      callout.tip === null && callout.at !== null
                        ? droppedOn('balloon', callout.at).at
                        : null,
                  },
                  'tip',
                )
              }
            >
              {t(callout.tip === null ? 'form.leader' : 'form.noLeader')}
            </Button>
          )}
          <Button onClick={() => onSet({ at: null, tip: null }, 'place')}>{t('form.takeOff')}</Button>
          <Button onClick={onRemove}>{t('form.remove')}</Button>
        </div>
        <p className="note keys">{t('form.keys')}</p>
      </AriaDialog>
    </Popover>
  )
}

function MeasureFields({ measure, onChange }: { measure: Measure; onChange: (measure: Measure) => void }) {
  const { t } = useTranslation('editingFigures')
  const [typed, setTyped] = useState(measure.typed ?? measure.value)
  const parsed = parseMeasure(typed, measure.unit)
  const change = (text: string): void => {
    setTyped(text)
    const now = parseMeasure(text, measure.unit)
    if (now.ok) onChange(now.measure)
  }
  return (
    <div className="value-and-unit">
      <TextField
        label={t('form.value')}
        value={typed}
        dir="ltr"
        onFocus={(event) => event.target.select()}
        onChange={(event) => change(event.target.value)}
        error={parsed.ok ? undefined : t(`trouble.${parsed.why}`, { ns: 'editingText' })}
      />
      <UnitSelect
        label={t('form.unit')}
        value={measure.unit}
        onChange={(unit) => {
          setTyped(measure.value)
          onChange({ value: measure.value, unit })
        }}
      />
    </div>
  )
}
