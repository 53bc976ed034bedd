import { useRef, useState, type ChangeEvent } from 'react'
import { useTranslation } from 'react-i18next'
import { X } from 'lucide-react'
import { fileAddress, type FileEntry } from '../../../../shared/api/files'
import { insertNode, setNode } from '../../../../shared/guide/edit'
import type { Model, Step } from '../../../../shared/guide/schema'
import { Button } from '../../../components/controls/Button'
import { Select } from '../../../components/controls/Select'
import { AddByName } from '../fields/AddByName'
import { GuideText } from '../fields/GuideText'
import { useDraft } from '../draftStore'
import { focusPlace } from '../frame/useGoToPlace'
import { useOpenDraft } from '../frame/sessionContext'
import { localeOf } from '../../../lib/localeOf'

/** The printable or cuttable solids that a step needs: out of the guide's, or brought in as STL. */
export function StepModels({ step }: { step: Step }) {
  const { t } = useTranslation('editing')
  const { document, edit, newId, readOnly, bringFiles, announce } = useDraft()
  const { sayDone } = useOpenDraft()
  const chooser = useRef<HTMLInputElement>(null)
  const [busy, setBusy] = useState(false)
  const models = step.models.flatMap((id) => document.models.filter((model) => model.id === id))
  const bring = async (event: ChangeEvent<HTMLInputElement>): Promise<void> => {
    const chosen = [...(event.target.files ?? [])]
    event.target.value = ''
    if (chosen.length === 0) return
    setBusy(true)
    try {
      const stored = (await bringFiles(chosen)).filter((file) => file.kind === 'model')
      const fresh = stored.map((file): Model => modelOf(file, newId()))
      edit((doc) =>
        fresh.reduce((now, model) => {
          const known = now.models.find((each) => each.asset === model.asset)
          const models = now.sections
            .flatMap((section) => section.steps)
            .find((each) => each.id === step.id)?.models
          const id = known?.id ?? model.id
          const listed = known === undefined ? insertNode(now, 'model', model, null) : now
          return models?.includes(id) === true
            ? listed
            : setNode(listed, 'step', step.id, { models: [...(models ?? []), id] })
        }, doc),
      )
      if (fresh.length > 0) announce(t('model.added', { count: fresh.length }))
    } finally {
      setBusy(false)
    }
  }
  const remove = (model: Model): void => {
    edit((doc) => setNode(doc, 'step', step.id, { models: step.models.filter((id) => id !== model.id) }))
    sayDone(t('model.removed', { name: model.name }))
    setTimeout(() => focusPlace(null, 'add-model'))
  }
  return (
    <section className="step-part" data-field="models">
      <h2 className="t2">{t('model.title')}</h2>
      {models.length > 0 && (
        <ul className="rows">
          {models.map((model) => (
            <ModelRow key={model.id} model={model} onRemove={() => remove(model)} />
          ))}
        </ul>
      )}
      {!readOnly && (
        <div className="add-model" data-field="add-model">
          {document.models.length > models.length && (
            <AddByName
              label={t('model.add')}
              hideLabel
              placeholder={t('model.addHint')}
              items={document.models
                .filter((model) => !step.models.includes(model.id))
                .map((model) => ({ id: model.id, text: model.name }))}
              onChoose={(id) =>
                edit((doc) => setNode(doc, 'step', step.id, { models: [...step.models, id] }))
              }
            />
          )}
          <input
            ref={chooser}
            type="file"
            hidden
            multiple
            accept=".stl,model/stl"
            onChange={(event) => void bring(event)}
          />
          <Button busy={busy} onClick={() => chooser.current?.click()}>
            {t('model.bring')}
          </Button>
        </div>
      )}
    </section>
  )
}

/** An STL does not say its unit; millimetres are what nearly all are in, and the row lets it be changed. */
const modelOf = (file: FileEntry, id: string): Model => ({
  id,
  asset: file.sha256,
  name: file.name.replace(/\.stl$/i, ''),
  unit: 'mm',
  material: '',
})

function ModelRow({ model, onRemove }: { model: Model; onRemove: () => void }) {
  const { t } = useTranslation('editing')
  const { edit, files, readOnly } = useDraft()
  const set = (patch: Partial<Model>, field: string): void =>
    edit((doc) => setNode(doc, 'model', model.id, patch), `model.${field}.${model.id}`)
  const file = files.get(model.asset)
  return (
    <li className="model-row" data-node={model.id}>
      {file?.renditions.some(({ name }) => name === 'still') === true && (
        <img src={fileAddress(model.asset, 'still')} alt="" width={72} height={72} loading="lazy" />
      )}
      <div className="model-fields">
        <GuideText
          look="plain"
          label={t('model.name')}
          field="name"
          value={model.name}
          onChange={(name) => set({ name }, 'name')}
        />
        <GuideText
          look="plain"
          label={t('model.material')}
          optional
          field="material"
          value={model.material}
          onChange={(material) => set({ material }, 'material')}
        />
        <Select
          label={t('model.unit')}
          value={model.unit}
          disabled={readOnly}
          options={(['mm', 'cm', 'm', 'in'] as const).map((unit) => ({ value: unit, label: unit }))}
          onChange={(event) => set({ unit: event.target.value as Model['unit'] }, 'unit')}
        />
        <ModelFacts file={file} unit={model.unit} />
      </div>
      {!readOnly && (
        <button
          type="button"
          className="remove"
          onClick={onRemove}
          aria-label={t('model.remove', { name: model.name })}
        >
          <X size={16} aria-hidden />
        </button>
      )}
    </li>
  )
}

/** What is measured of it, or how far that is. */
function ModelFacts({ file, unit }: { file: FileEntry | undefined; unit: string }) {
  const { t, i18n } = useTranslation('editing')
  if (file === undefined) return null
  if (file.state === 'working') return <p className="note">{t('model.working')}</p>
  if (file.state === 'failed') return <p className="note oxide">{file.trouble ?? t('model.failed')}</p>
  if (file.model === null) return null
  const number = new Intl.NumberFormat(localeOf(i18n.language), { maximumFractionDigits: 1 })
  const { x, y, z } = file.model.box
  return (
    <p className="note num">
      <bdi>
        {[x, y, z].map((side) => number.format(side)).join(' × ')} {unit}
      </bdi>
      {', '}
      {t('model.triangles', { count: file.model.triangles })}
      {', '}
      <span className={file.model.closed ? 'lichen' : 'ochre'}>
        {t(file.model.closed ? 'model.closed' : 'model.open')}
      </span>
    </p>
  )
}
