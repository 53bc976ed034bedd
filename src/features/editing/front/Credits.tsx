import { useTranslation } from 'react-i18next'
import { Plus, X } from 'lucide-react'
import { insertNode, removeNode, setNode } from '../../../../shared/guide/edit'
import { Button } from '../../../components/controls/Button'
import { useDraft } from '../draftStore'
import { GuideText } from '../fields/GuideText'
import { focusPlace } from '../frame/useGoToPlace'
import { useOpenDraft } from '../frame/sessionContext'

/** Whose work is in it, and what each did. */
export function Credits() {
  const { t } = useTranslation('editing')
  const { document, edit, newId, readOnly } = useDraft()
  const { sayDone } = useOpenDraft()
  const add = (): void => {
    const id = newId()
    edit((doc) => insertNode(doc, 'credit', { id, name: '', role: '' }, null))
    setTimeout(() => focusPlace(id, 'name'))
  }
  const remove = (id: string, name: string): void => {
    edit((doc) => removeNode(doc, 'credit', id))
    sayDone(t('credit.removed', { name }))
    setTimeout(() => focusPlace(null, 'add-credit'))
  }
  return (
    <section className="step-part" data-field="credits">
      <h2 className="t2">{t('credit.title')}</h2>
      {document.credits.length > 0 && (
        <ul className="rows">
          {document.credits.map((credit) => (
            <li key={credit.id} data-node={credit.id} className="credit-row">
              <GuideText
                look="plain"
                label={t('credit.name')}
                field="name"
                value={credit.name}
                onChange={(name) =>
                  edit((doc) => setNode(doc, 'credit', credit.id, { name }), `credit.name.${credit.id}`)
                }
              />
              <GuideText
                look="plain"
                label={t('credit.role')}
                field="role"
                placeholder={t('credit.roleHint')}
                value={credit.role}
                onChange={(role) =>
                  edit((doc) => setNode(doc, 'credit', credit.id, { role }), `credit.role.${credit.id}`)
                }
              />
              {!readOnly && (
                <button
                  type="button"
                  className="remove"
                  onClick={() => remove(credit.id, credit.name)}
                  aria-label={t('credit.remove', { name: credit.name })}
                >
                  <X size={16} aria-hidden />
                </button>
              )}
            </li>
          ))}
        </ul>
      )}
      {!readOnly && (
        <div data-field="add-credit">
          <Button kind="quiet" onClick={add}>
            <Plus size={16} aria-hidden />
            {t('credit.add')}
          </Button>
        </div>
      )}
    </section>
  )
}
