import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { ArrowDown, ArrowUp, Plus } from 'lucide-react'
import { insertNode, moveNode, removeNode, setNode } from '../../../../shared/guide/edit'
import type { Reconciled } from '../../../../shared/guide/reconcile'
import { removeWithReferences } from '../../../../shared/guide/removeWithReferences'
import { LineKind, type Line, type Option, type Source } from '../../../../shared/guide/schema'
import type { Id } from '../../../../shared/lib/ids/id'
import { Button } from '../../../components/controls/Button'
import { Dialog } from '../../../components/controls/Dialog'
import { Select } from '../../../components/controls/Select'
import { TextField } from '../../../components/controls/TextField'
import { useDraft } from '../draftStore'
import { GuideText } from '../fields/GuideText'
import { useOpenDraft } from '../frame/sessionContext'
import { CellField } from './CellField'
import { newOption } from './newOption'
import { Standing } from './Standing'
import type { LineActs } from './useLineActs'
import { useKindWords } from './useKindWords'

export interface LineSheetProps {
  lineId: Id
  balance: Reconciled | undefined
  acts: LineActs
  onClose: () => void
}

/** All of a line on one sheet: its quantity, the designer's part, its substitutes, where they come from. */
export function LineSheet({ lineId, balance, acts, onClose }: LineSheetProps) {
  const { t } = useTranslation('editingLedger')
  const { document, edit, newId, numbers, readOnly } = useDraft()
  const kinds = useKindWords()
  const line = document.lines.find(({ id }) => id === lineId)
  if (line === undefined) return null
  const name = line.options[0]!.part.name
  const title = t('sheet.title', { number: numbers.line[lineId], name: name === '' ? t('untitled') : name })
  const off = balance !== undefined && ['more used', 'more listed', 'no quantity'].includes(balance.balance)
  return (
    <Dialog title={title} open onClose={onClose} wide>
      <div className="line-sheet">
        <div className="line-numbers">
          <Select
            label={t('column.kind')}
            value={line.kind}
            disabled={readOnly}
            options={LineKind.options.map((kind) => ({ value: kind, label: kinds[kind] }))}
            onChange={(event) => {
              const kind = LineKind.parse(event.target.value)
              edit((doc) => setNode(doc, 'line', lineId, { kind }))
            }}
          />
          <CellField line={line} column="quantity" kinds={kinds} description={t('sheet.quantityHint')} />
          <CellField line={line} column="unit" kinds={kinds} />
          <CellField line={line} column="spare" kinds={kinds} />
        </div>
        {balance !== undefined && (
          <p className="note standing">
            <Standing of={balance} />
            {off && !readOnly && <Button onClick={() => acts.take(lineId)}>{t('take.one')}</Button>}
          </p>
        )}
        <GuideText
          lines
          label={t('column.note')}
          optional
          value={line.note}
          onChange={(note) => edit((doc) => setNode(doc, 'line', lineId, { note }), `line.note.${lineId}`)}
        />
        <Options line={line} />
        {!readOnly && (
          <div className="actions">
            <Button
              onClick={() => edit((doc) => insertNode(doc, 'option', newOption(newId, line.kind), lineId))}
            >
              <Plus size={16} aria-hidden />
              {t('option.add')}
            </Button>
          </div>
        )}
        {!readOnly && (
          <div className="actions sheet-foot">
            <Button disabled={!acts.canMove} onClick={() => acts.move(lineId, -1)}>
              {t('acts.up')}
            </Button>
            <Button disabled={!acts.canMove} onClick={() => acts.move(lineId, 1)}>
              {t('acts.down')}
            </Button>
            <Button onClick={() => acts.nest(lineId, true)}>{t('acts.nest')}</Button>
            {line.within !== undefined && (
              <Button onClick={() => acts.nest(lineId, false)}>{t('acts.nestOut')}</Button>
            )}
            <Button
              onClick={() => {
                onClose()
                acts.remove(lineId)
              }}
            >
              {t('acts.remove')}
            </Button>
          </div>
        )}
      </div>
    </Dialog>
  )
}

function Options({ line }: { line: Line }) {
  const { t } = useTranslation('editingLedger')
  const { edit, readOnly } = useDraft()
  const { sayDone } = useOpenDraft()
  return (
    <ol className="line-options">
      {line.options.map((option, index) => (
        <li key={option.id} data-node={option.id}>
          <div className="option-head">
            <h3>{index === 0 ? t('option.designers') : t('option.substitute', { number: index })}</h3>
            {!readOnly && line.options.length > 1 && (
              <span>
                <button
                  type="button"
                  className="remove"
                  disabled={index === 0}
                  aria-label={t('option.up', { name: option.part.name })}
                  onClick={() => edit((doc) => moveNode(doc, 'option', option.id, line.id, index - 1))}
                >
                  <ArrowUp size={16} aria-hidden />
                </button>
                <button
                  type="button"
                  className="remove"
                  disabled={index === line.options.length - 1}
                  aria-label={t('option.down', { name: option.part.name })}
                  onClick={() => edit((doc) => moveNode(doc, 'option', option.id, line.id, index + 1))}
                >
                  <ArrowDown size={16} aria-hidden />
                </button>
                <Button
                  kind="quiet"
                  onClick={() => {
                    edit((doc) => removeWithReferences(doc, 'option', option.id))
                    sayDone(t('option.removed', { name: option.part.name }))
                  }}
                >
                  {t('option.remove')}
                </Button>
              </span>
            )}
          </div>
          <OptionFields line={line} option={option} />
        </li>
      ))}
    </ol>
  )
}

function OptionFields({ line, option }: { line: Line; option: Option }) {
  const { t } = useTranslation('editingLedger')
  const { document, edit, newId, readOnly } = useDraft()
  const set = (patch: Partial<Option>, field: string): void =>
    edit((doc) => setNode(doc, 'option', option.id, patch), `option.${field}.${option.id}`)
  const setPart = (patch: Partial<Option['part']>, field: string): void =>
    set({ part: { ...option.part, ...patch } }, field)
  const { designation: _without, ...plainPart } = option.part
  return (
    <div className="option-fields">
      <GuideText
        label={t('column.name')}
        field="name"
        value={option.part.name}
        onChange={(name) => setPart({ name }, 'name')}
      />
      <GuideText
        label={t('column.designation')}
        optional
        field="designation"
        value={option.part.designation ?? ''}
        onChange={(text) =>
          set({ part: text === '' ? plainPart : { ...plainPart, designation: text } }, 'designation')
        }
      />
      <GuideText
        lines
        label={t('column.specification')}
        description={t('option.specificationHint')}
        field="specification"
        value={option.part.specification}
        onChange={(specification) => setPart({ specification }, 'specification')}
      />
      <Regions option={option} />
      {line.kind === 'printed' && (
        <Select
          label={t('column.model')}
          disabled={readOnly}
          value={option.print?.model ?? ''}
          options={[
            { value: '', label: t('noModel') },
            ...document.models.map(({ id, name }) => ({ value: id, label: name })),
          ]}
          onChange={(event) => {
            const model = event.target.value === '' ? null : event.target.value
            set({ print: { ...(option.print ?? NO_PRINT), model } }, 'model')
          }}
        />
      )}
      {line.kind === 'printed' && (
        <GuideText
          label={t('option.material')}
          optional
          value={option.print?.material ?? ''}
          onChange={(material) => set({ print: { ...(option.print ?? NO_PRINT), material } }, 'material')}
        />
      )}
      <div className="sources">
        {option.sources.map((source) => (
          <SourceFields key={source.id} source={source} />
        ))}
        {!readOnly && (
          <Button
            kind="quiet"
            onClick={() =>
              edit((doc) =>
                insertNode(
                  doc,
                  'source',
                  { id: newId(), supplier: '', address: '', price: '', searchWords: '' },
                  option.id,
                ),
              )
            }
          >
            <Plus size={16} aria-hidden />
            {t('source.add')}
          </Button>
        )}
      </div>
    </div>
  )
}

const NO_PRINT = { model: null, material: '', layer: null, walls: null, infill: null, supports: null }

/** Where a part can be had, by codes of ISO 3166 or UN M.49. What is no code is said and kept in the field. */
function Regions({ option }: { option: Option }) {
  const { t } = useTranslation('editingLedger')
  const { edit, readOnly } = useDraft()
  const [typed, setTyped] = useState(option.regions.join(', '))
  const codes = typed
    .toUpperCase()
    .split(/[\s,;،]+/)
    .filter(Boolean)
  const wrong = codes.find((code) => !/^([A-Z]{2}|\d{3})$/.test(code))
  const change = (text: string): void => {
    setTyped(text)
    const regions = text
      .toUpperCase()
      .split(/[\s,;،]+/)
      .filter(Boolean)
    if (regions.every((code) => /^([A-Z]{2}|\d{3})$/.test(code)))
      edit(
        (doc) => setNode(doc, 'option', option.id, { regions: [...new Set(regions)] }),
        `option.regions.${option.id}`,
      )
  }
  return (
    <TextField
      label={t('option.regions')}
      optional
      description={t('option.regionsHint')}
      dir="ltr"
      readOnly={readOnly}
      value={typed}
      error={wrong === undefined ? undefined : t('option.regionsWrong', { code: wrong })}
      onChange={(event) => change(event.target.value)}
    />
  )
}

/** Where the designer found it, in the designer's words. */
function SourceFields({ source }: { source: Source }) {
  const { t } = useTranslation('editingLedger')
  const { edit, readOnly } = useDraft()
  const { sayDone } = useOpenDraft()
  const [address, setAddress] = useState<string>(source.address)
  const set = (patch: Partial<Source>, field: string): void =>
    edit((doc) => setNode(doc, 'source', source.id, patch), `source.${field}.${source.id}`)
  const isAddress = address === '' || /^https?:\/\/[^\s.]+\.[^\s]+$/i.test(address)
  return (
    <div className="source" data-node={source.id}>
      <GuideText
        label={t('source.supplier')}
        value={source.supplier}
        onChange={(supplier) => set({ supplier }, 'supplier')}
      />
      <TextField
        label={t('source.address')}
        optional
        dir="ltr"
        inputMode="url"
        readOnly={readOnly}
        value={address}
        error={isAddress ? undefined : t('source.addressWrong')}
        onChange={(event) => {
          const text = event.target.value.trim()
          setAddress(event.target.value)
          if (
            (text === '' || /^https?:\/\/[^\s.]+\.[^\s]+$/i.test(text)) &&
            URL.canParse(text === '' ? 'https://a.b' : text)
          )
            set({ address: text }, 'address')
        }}
      />
      <GuideText
        label={t('source.searchWords')}
        optional
        value={source.searchWords}
        onChange={(searchWords) => set({ searchWords }, 'searchWords')}
      />
      <GuideText
        label={t('source.price')}
        optional
        maxLength={60}
        value={source.price}
        onChange={(price) => set({ price }, 'price')}
      />
      {!readOnly && (
        <Button
          kind="quiet"
          onClick={() => {
            edit((doc) => removeNode(doc, 'source', source.id))
            sayDone(t('source.removed'))
          }}
        >
          {t('source.remove')}
        </Button>
      )}
    </div>
  )
}
