import { useTranslation } from 'react-i18next'
import { X } from 'lucide-react'
import { insertNode, removeNode, setNode } from '../../../../shared/guide/edit'
import { reconcile, type Reconciled } from '../../../../shared/guide/reconcile'
import type { Line, Step, Use } from '../../../../shared/guide/schema'
import { AddByName } from '../fields/AddByName'
import { Balloon } from '../fields/Balloon'
import { DecimalInput } from '../fields/DecimalInput'
import { UnitSelect } from '../fields/UnitSelect'
import { useUnitWord } from '../fields/useUnitWord'
import { useDraft } from '../draftStore'
import { focusPlace } from '../frame/useGoToPlace'
import { useOpenDraft } from '../frame/sessionContext'
import { newLine } from './newLine'

/** The parts taken in hand in this step, each beside how the whole guide's use stands to the parts list. */
export function Uses({ step }: { step: Step }) {
  const { t } = useTranslation('editing')
  const { document, edit, newId, numbers, readOnly, choices, announce } = useDraft()
  const { sayDone } = useOpenDraft()
  const reconciled = new Map(reconcile(document, choices).lines.map((line) => [line.line, line]))
  const taken = new Set(step.uses.map((use) => use.line))

  const add = (line: Line): void => {
    const use: Use = { id: newId(), line: line.id, quantity: firstQuantity(line) }
    edit((doc) => insertNode(doc, 'use', use, step.id))
    announce(t('use.added', { name: nameOf(line) }))
    setTimeout(() => focusPlace(use.id, 'quantity'))
  }
  const addNew = (name: string): void => {
    const line = newLine(newId, name)
    const use: Use = { id: newId(), line: line.id, quantity: { value: '1', unit: 'each' } }
    edit((doc) => insertNode(insertNode(doc, 'line', line, null), 'use', use, step.id))
    announce(t('use.addedNew', { name }))
    setTimeout(() => focusPlace(use.id, 'quantity'))
  }
  const remove = (use: Use): void => {
    const line = document.lines.find((each) => each.id === use.line)
    const at = step.uses.indexOf(use)
    edit((doc) => removeNode(doc, 'use', use.id))
    sayDone(t('use.removed', { name: line === undefined ? '' : nameOf(line) }))
    const next = step.uses[at + 1] ?? step.uses[at - 1]
    setTimeout(() => focusPlace(next?.id ?? null, next === undefined ? 'add-use' : 'quantity'))
  }
  return (
    <section className="step-part" data-field="uses">
      <table className="ledger fold use">
        <caption>{t('use.title')}</caption>
        {step.uses.length > 0 && (
          <thead>
            <tr>
              <th>
                <span className="visually-hidden">{t('use.number')}</span>
              </th>
              <th>{t('use.part')}</th>
              <th className="r">{t('use.here')}</th>
              <th className="r">{t('use.inGuide')}</th>
              <th>
                <span className="visually-hidden">{t('use.acts')}</span>
              </th>
            </tr>
          </thead>
        )}
        <tbody>
          {step.uses.map((use) => (
            <UseRow
              key={use.id}
              use={use}
              line={document.lines.find((each) => each.id === use.line)}
              standing={reconciled.get(use.line)}
              onRemove={() => remove(use)}
            />
          ))}
        </tbody>
      </table>
      {!readOnly && (
        <div data-field="add-use">
          <AddByName
            label={t('use.add')}
            hideLabel={step.uses.length > 0}
            placeholder={t('use.addHint')}
            items={document.lines
              .filter((line) => !taken.has(line.id))
              .map((line) => ({
                id: line.id,
                text: nameOf(line),
                content: (
                  <span className="choice-of-line">
                    <Balloon line={line.id} />
                    <span dir="auto">{nameOf(line)}</span>
                    <small>{t('use.line', { number: numbers.line[line.id] })}</small>
                  </span>
                ),
              }))}
            onChoose={(id) => {
              const line = document.lines.find((each) => each.id === id)
              if (line !== undefined) add(line)
            }}
            newSays={(name) => t('use.newLine', { name })}
            onNew={addNew}
          />
        </div>
      )}
    </section>
  )
}

interface UseRowProps {
  use: Use
  line: Line | undefined
  standing: Reconciled | undefined
  onRemove: () => void
}

function UseRow({ use, line, standing, onRemove }: UseRowProps) {
  const { t } = useTranslation('editing')
  const { edit, readOnly } = useDraft()
  const name = line === undefined ? t('use.gone') : nameOf(line)
  const setQuantity = (quantity: Use['quantity']): void =>
    edit((doc) => setNode(doc, 'use', use.id, { quantity }), `use.${use.id}`)
  const unit = use.quantity?.unit ?? line?.quantity?.unit ?? 'each'
  return (
    <tr data-node={use.id}>
      <td className="balloon-cell">
        <Balloon line={use.line} />
      </td>
      <td>
        <span dir="auto">{name}</span>
      </td>
      <td className="r quantity-cell" data-field="quantity">
        <DecimalInput
          hideLabel
          label={t('use.quantityOf', { name })}
          value={use.quantity?.value ?? null}
          placeholder={t('use.asNeeded')}
          onChange={(value) => setQuantity(value === null ? null : { value, unit })}
        />
        <UnitSelect
          hideLabel
          label={t('use.unitOf', { name })}
          value={unit}
          onChange={(next) => setQuantity({ value: use.quantity?.value ?? '1', unit: next })}
        />
      </td>
      <td className="r standing-cell">{standing && <Standing of={standing} />}</td>
      <td className="r">
        {!readOnly && (
          <button type="button" className="remove" onClick={onRemove} aria-label={t('use.remove', { name })}>
            <X size={16} aria-hidden />
          </button>
        )}
      </td>
    </tr>
  )
}

/** How the use in all steps stands to the parts list, in words and colour. */
function Standing({ of }: { of: Reconciled }) {
  const { t } = useTranslation('editing')
  const word = useUnitWord()
  const used = of.used === null ? '' : of.used.value
  const listed = of.listed === null ? '' : of.listed.value
  const unit = of.listed?.unit ?? of.used?.unit ?? 'each'
  const symbol = unit === 'each' ? '' : ` ${word(unit)}`
  const tone =
    of.balance === 'even' || of.balance === 'as needed'
      ? 'lichen'
      : of.balance === 'more listed'
        ? 'ochre'
        : 'oxide'
  return <span className={tone}>{t(`balance.${of.balance}`, { used, listed, unit: symbol })}</span>
}

const nameOf = (line: Line): string => line.options[0]?.part.name ?? ''

/** What a person most likely takes: one piece, or nothing yet of what is measured. */
const firstQuantity = (line: Line): Use['quantity'] =>
  line.quantity === null
    ? null
    : { value: line.quantity.unit === 'each' ? '1' : line.quantity.value, unit: line.quantity.unit }
