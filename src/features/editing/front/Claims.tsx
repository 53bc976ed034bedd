import { useTranslation } from 'react-i18next'
import { Plus } from 'lucide-react'
import { insertNode, removeNode, setNode } from '../../../../shared/guide/edit'
import type { Claim } from '../../../../shared/guide/schema'
import type { Id } from '../../../../shared/lib/ids/id'
import { UNITS } from '../../../../shared/lib/units/units'
import { Button } from '../../../components/controls/Button'
import { Select } from '../../../components/controls/Select'
import { useDraft } from '../draftStore'
import { DecimalInput } from '../fields/DecimalInput'
import { GuideText } from '../fields/GuideText'
import { UnitSelect } from '../fields/UnitSelect'
import { focusPlace } from '../frame/useGoToPlace'
import { useOpenDraft } from '../frame/sessionContext'

const EVIDENCE = ['bench run', 'formula', 'source', 'none'] as const

const emptyClaim = (id: Id): Claim => ({
  id,
  label: '',
  quantity: { value: '0', unit: 'W' },
  conditions: '',
  evidence: { kind: 'none' },
})

/** What the machine is said to do, under which conditions, and what shows it. */
export function Claims() {
  const { t } = useTranslation('editing')
  const { document, edit, newId, readOnly } = useDraft()
  const { sayDone } = useOpenDraft()
  const add = (): void => {
    const claim = emptyClaim(newId())
    edit((doc) => insertNode(doc, 'claim', claim, null))
    setTimeout(() => focusPlace(claim.id, 'label'))
  }
  const remove = (claim: Claim): void => {
    edit((doc) => removeNode(doc, 'claim', claim.id))
    sayDone(t('claim.removed', { name: claim.label }))
    setTimeout(() => focusPlace(null, 'add-claim'))
  }
  return (
    <section className="step-part" data-field="claims">
      <h2 className="t2">{t('claim.title')}</h2>
      <p className="note">{t('claim.hint')}</p>
      {document.claims.map((claim) => (
        <ClaimFields key={claim.id} claim={claim} onRemove={() => remove(claim)} />
      ))}
      {!readOnly && (
        <div data-field="add-claim">
          <Button kind="quiet" onClick={add}>
            <Plus size={16} aria-hidden />
            {t('claim.add')}
          </Button>
        </div>
      )}
    </section>
  )
}

function ClaimFields({ claim, onRemove }: { claim: Claim; onRemove: () => void }) {
  const { t } = useTranslation('editing')
  const { edit, readOnly } = useDraft()
  const set = (patch: Partial<Claim>, field: string): void =>
    edit((doc) => setNode(doc, 'claim', claim.id, patch), `claim.${field}.${claim.id}`)
  const { quantity, evidence } = claim
  const unit = UNITS[quantity.unit].symbol || undefined
  return (
    <div
      className="claim"
      data-node={claim.id}
      role="group"
      aria-label={claim.label === '' ? t('claim.untitled') : claim.label}
    >
      <GuideText
        label={t('claim.label')}
        field="label"
        placeholder={t('claim.labelHint')}
        value={claim.label}
        onChange={(label) => set({ label }, 'label')}
      />
      <div className="limits">
        <div data-field="quantity">
          <DecimalInput
            below0
            label={t('claim.value')}
            unit={unit}
            value={quantity.value}
            onChange={(value) => set({ quantity: { ...quantity, value: value ?? '0' } }, 'value')}
          />
        </div>
        <DecimalInput
          label={t('claim.uncertainty')}
          unit={unit}
          value={quantity.uncertainty ?? null}
          onChange={(value) => {
            const { uncertainty: _, ...rest } = quantity
            set({ quantity: value === null ? rest : { ...rest, uncertainty: value } }, 'uncertainty')
          }}
        />
        <UnitSelect
          label={t('claim.unit')}
          value={quantity.unit}
          onChange={(next) => set({ quantity: { ...quantity, unit: next } }, 'unit')}
        />
      </div>
      <GuideText
        label={t('claim.conditions')}
        field="conditions"
        placeholder={t('claim.conditionsHint')}
        value={claim.conditions}
        onChange={(conditions) => set({ conditions }, 'conditions')}
      />
      <div data-field="evidence">
        <Select
          label={t('claim.evidence')}
          value={evidence.kind}
          disabled={readOnly}
          options={EVIDENCE.map((kind) => ({ value: kind, label: t(`claim.kind.${kind}`) }))}
          onChange={(event) => set({ evidence: evidenceOf(event.target.value, evidence) }, 'evidence')}
        />
      </div>
      {evidence.kind !== 'none' && (
        <GuideText
          lines
          label={t(`claim.text.${evidence.kind}`)}
          field="evidence-text"
          value={evidence.text}
          onChange={(text) => set({ evidence: { ...evidence, text } }, 'evidence-text')}
        />
      )}
      {!readOnly && (
        <p>
          <Button kind="quiet" onClick={onRemove}>
            {t('claim.remove')}
          </Button>
        </p>
      )}
    </div>
  )
}

/** The words stay when the kind of evidence changes. */
function evidenceOf(kind: string, before: Claim['evidence']): Claim['evidence'] {
  const text = before.kind === 'none' ? '' : before.text
  const found = EVIDENCE.find((each) => each === kind) ?? 'none'
  return found === 'none' ? { kind: found } : { kind: found, text }
}
