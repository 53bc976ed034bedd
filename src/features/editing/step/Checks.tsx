import { useTranslation } from 'react-i18next'
import Big from 'big.js'
import { Plus } from 'lucide-react'
import { insertNode, removeNode, setNode } from '../../../../shared/guide/edit'
import type { Check, Step } from '../../../../shared/guide/schema'
import type { Id } from '../../../../shared/lib/ids/id'
import { UNITS } from '../../../../shared/lib/units/units'
import { Button } from '../../../components/controls/Button'
import { Checkbox } from '../../../components/controls/Checkbox'
import { useDraft } from '../draftStore'
import { DecimalInput } from '../fields/DecimalInput'
import { GuideText } from '../fields/GuideText'
import { UnitSelect } from '../fields/UnitSelect'
import { focusPlace } from '../frame/useGoToPlace'
import { useOpenDraft } from '../frame/sessionContext'

export const emptyCheck = (id: Id): Check => ({ id, text: '', measure: null })

/** What to verify in a step, with limits where it is measured. */
export function Checks({ step }: { step: Step }) {
  const { t } = useTranslation('editing')
  const { edit, newId, readOnly } = useDraft()
  const { sayDone } = useOpenDraft()
  const add = (): void => {
    const check = emptyCheck(newId())
    edit((doc) => insertNode(doc, 'check', check, step.id))
    setTimeout(() => focusPlace(check.id, 'text'))
  }
  const remove = (check: Check): void => {
    const at = step.checks.indexOf(check)
    edit((doc) => removeNode(doc, 'check', check.id))
    sayDone(t('check.removed'))
    const next = step.checks[at + 1] ?? step.checks[at - 1]
    setTimeout(() => (next === undefined ? focusPlace(null, 'add-check') : focusPlace(next.id, 'text')))
  }
  return (
    <section className="step-checks" aria-label={t('check.name')} data-field="checks">
      {step.checks.map((check) => (
        <CheckFields key={check.id} check={check} onRemove={() => remove(check)} />
      ))}
      {!readOnly && (
        <div data-field="add-check">
          <Button kind="quiet" onClick={add}>
            <Plus size={16} aria-hidden />
            {t('check.add')}
          </Button>
        </div>
      )}
    </section>
  )
}

type CheckMeasure = NonNullable<Check['measure']>

function CheckFields({ check, onRemove }: { check: Check; onRemove: () => void }) {
  const { t } = useTranslation('editing')
  const { edit, numbers, readOnly } = useDraft()
  const set = (patch: Partial<Check>, field: string): void =>
    edit((doc) => setNode(doc, 'check', check.id, patch), `check.${field}.${check.id}`)
  const { measure } = check
  const number = numbers.check[check.id] ?? ''
  return (
    <div className="check" data-node={check.id} role="group" aria-label={t('check.number', { number })}>
      <div className="q">
        <svg viewBox="0 0 24 24" aria-hidden="true">
          <path className="l1" d="M3 3h18v18H3z" />
        </svg>
        <div>
          <p className="label" aria-hidden>
            {t('check.number', { number })}
          </p>
          <GuideText
            look="plain"
            className="check-text"
            lines
            label={t('check.text')}
            hideLabel
            field="text"
            placeholder={t('check.textHint')}
            value={check.text}
            onChange={(text) => set({ text }, 'text')}
          />
        </div>
      </div>
      {measure !== null && (
        <Limits measure={measure} onChange={(next, field) => set({ measure: next }, field)} />
      )}
      {(check.otherwise !== undefined || measure !== null) && (
        <GuideText
          lines
          label={t('check.otherwise')}
          optional
          field="otherwise"
          value={check.otherwise ?? ''}
          onChange={(text) => set({ otherwise: text === '' ? undefined : text }, 'otherwise')}
        />
      )}
      {!readOnly && (
        <div className="actions">
          <Button
            kind="quiet"
            onClick={() =>
              set(
                {
                  measure:
                    measure === null ? { unit: 'mm', atLeast: null, atMost: null, oneSided: false } : null,
                },
                'measured',
              )
            }
          >
            {t(measure === null ? 'check.measure' : 'check.unmeasure')}
          </Button>
          <Button kind="quiet" onClick={onRemove}>
            {t('check.remove', { number })}
          </Button>
        </div>
      )}
    </div>
  )
}

interface LimitsProps {
  measure: CheckMeasure
  onChange: (measure: CheckMeasure, field: string) => void
}

function Limits({ measure, onChange }: LimitsProps) {
  const { t } = useTranslation('editing')
  const { readOnly } = useDraft()
  const { atLeast, atMost, oneSided } = measure
  const symbol = UNITS[measure.unit].symbol || undefined
  const crossed = atLeast !== null && atMost !== null && Big(atLeast).gt(atMost)
  const missing = !oneSided && (atLeast === null) !== (atMost === null)
  const none = atLeast === null && atMost === null
  const trouble = crossed
    ? t('check.crossed')
    : missing
      ? t('check.oneMissing')
      : none
        ? t('check.noLimit')
        : ''
  return (
    <>
      <div className="limits">
        <div data-field="atLeast">
          <DecimalInput
            below0
            label={t('check.atLeast')}
            unit={symbol}
            value={atLeast}
            className={missing && atLeast === null ? 'err' : undefined}
            onChange={(value) => onChange({ ...measure, atLeast: value }, 'atLeast')}
          />
        </div>
        <div data-field="atMost">
          <DecimalInput
            below0
            label={t('check.atMost')}
            unit={symbol}
            value={atMost}
            className={missing && atMost === null ? 'err' : undefined}
            onChange={(value) => onChange({ ...measure, atMost: value }, 'atMost')}
          />
        </div>
        <UnitSelect
          label={t('check.unit')}
          value={measure.unit}
          onChange={(unit) => onChange({ ...measure, unit }, 'unit')}
        />
      </div>
      {trouble !== '' && <p className="field-error">{trouble}</p>}
      {(missing || oneSided) && (
        <Checkbox
          label={t('check.oneSided')}
          checked={oneSided}
          disabled={readOnly}
          onChange={(event) => onChange({ ...measure, oneSided: event.target.checked }, 'oneSided')}
        />
      )}
    </>
  )
}
