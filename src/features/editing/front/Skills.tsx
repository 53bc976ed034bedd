import { useTranslation } from 'react-i18next'
import { Plus, X } from 'lucide-react'
import { insertNode, removeNode, setNode } from '../../../../shared/guide/edit'
import { Button } from '../../../components/controls/Button'
import { useDraft } from '../draftStore'
import { GuideText } from '../fields/GuideText'
import { focusPlace } from '../frame/useGoToPlace'
import { useOpenDraft } from '../frame/sessionContext'

/** What a maker has to be able to do. */
export function Skills() {
  const { t } = useTranslation('editing')
  const { document, edit, newId, readOnly } = useDraft()
  const { sayDone } = useOpenDraft()
  const add = (): void => {
    const id = newId()
    edit((doc) => insertNode(doc, 'skill', { id, name: '' }, null))
    setTimeout(() => focusPlace(id, 'name'))
  }
  const remove = (id: string, name: string): void => {
    edit((doc) => removeNode(doc, 'skill', id))
    sayDone(t('skill.removed', { name }))
    setTimeout(() => focusPlace(null, 'add-skill'))
  }
  return (
    <section className="step-part" data-field="skills">
      <h2 className="t2">{t('skill.title')}</h2>
      {document.skills.length > 0 && (
        <ul className="rows">
          {document.skills.map((skill, index) => (
            <li key={skill.id} data-node={skill.id}>
              <GuideText
                look="plain"
                label={t('skill.name', { number: index + 1 })}
                hideLabel
                field="name"
                placeholder={t('skill.hint')}
                value={skill.name}
                onChange={(name) =>
                  edit((doc) => setNode(doc, 'skill', skill.id, { name }), `skill.${skill.id}`)
                }
              />
              {!readOnly && (
                <button
                  type="button"
                  className="remove"
                  onClick={() => remove(skill.id, skill.name)}
                  aria-label={t('skill.remove', { name: skill.name })}
                >
                  <X size={16} aria-hidden />
                </button>
              )}
            </li>
          ))}
        </ul>
      )}
      {!readOnly && (
        <div data-field="add-skill">
          <Button kind="quiet" onClick={add}>
            <Plus size={16} aria-hidden />
            {t('skill.add')}
          </Button>
        </div>
      )}
    </section>
  )
}
