import { useTranslation } from 'react-i18next'
import { X } from 'lucide-react'
import { insertNode, setNode } from '../../../../shared/guide/edit'
import type { GuideDocument, Step, Tool } from '../../../../shared/guide/schema'
import type { Id } from '../../../../shared/lib/ids/id'
import { AddByName } from '../fields/AddByName'
import { GuideText } from '../fields/GuideText'
import { useDraft } from '../draftStore'
import { focusPlace } from '../frame/useGoToPlace'
import { useOpenDraft } from '../frame/sessionContext'
import { stepsOf } from '../../../../shared/guide/stepsOf'

/** The tools of a step, out of the guide's tools. A tool that no step needs any more leaves the guide. */
export function StepTools({ step }: { step: Step }) {
  const { t } = useTranslation('editing')
  const { document, edit, newId, readOnly, announce } = useDraft()
  const { sayDone } = useOpenDraft()
  const tools = step.tools.flatMap((id) => document.tools.filter((tool) => tool.id === id))
  const add = (id: Id): void => {
    edit((doc) => setNode(doc, 'step', step.id, { tools: [...step.tools, id] }))
    announce(t('tool.added', { name: document.tools.find((tool) => tool.id === id)?.name ?? '' }))
    setTimeout(() => focusPlace(null, 'add-tool'))
  }
  const addNew = (name: string): void => {
    const tool: Tool = { id: newId(), name }
    edit((doc) =>
      setNode(insertNode(doc, 'tool', tool, null), 'step', step.id, { tools: [...step.tools, tool.id] }),
    )
    announce(t('tool.added', { name }))
    setTimeout(() => focusPlace(null, 'add-tool'))
  }
  const remove = (tool: Tool): void => {
    edit((doc) => withoutTool(doc, step, tool.id))
    sayDone(t('tool.removed', { name: tool.name }))
    setTimeout(() => focusPlace(null, 'add-tool'))
  }
  return (
    <section className="step-part" data-field="tools">
      <h2 className="t2">{t('tool.title')}</h2>
      {tools.length > 0 && (
        <ul className="rows">
          {tools.map((tool) => (
            <li key={tool.id} data-node={tool.id}>
              <GuideText
                look="plain"
                label={t('tool.nameOf', { name: tool.name })}
                hideLabel
                field="name"
                value={tool.name}
                onChange={(name) => edit((doc) => setNode(doc, 'tool', tool.id, { name }), `tool.${tool.id}`)}
              />
              {!readOnly && (
                <button
                  type="button"
                  className="remove"
                  onClick={() => remove(tool)}
                  aria-label={t('tool.remove', { name: tool.name })}
                >
                  <X size={16} aria-hidden />
                </button>
              )}
            </li>
          ))}
        </ul>
      )}
      {!readOnly && (
        <div data-field="add-tool">
          <AddByName
            label={t('tool.add')}
            hideLabel
            placeholder={t('tool.addHint')}
            items={document.tools
              .filter((tool) => !step.tools.includes(tool.id))
              .map((tool) => ({ id: tool.id, text: tool.name }))}
            onChoose={add}
            newSays={(name) => t('tool.new', { name })}
            onNew={addNew}
          />
        </div>
      )}
    </section>
  )
}

function withoutTool(document: GuideDocument, step: Step, toolId: Id): GuideDocument {
  const without = setNode(document, 'step', step.id, { tools: step.tools.filter((id) => id !== toolId) })
  const needed = stepsOf(without).some((each) => each.tools.includes(toolId))
  return needed ? without : { ...without, tools: without.tools.filter((tool) => tool.id !== toolId) }
}
