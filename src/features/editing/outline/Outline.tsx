import { useId, useState } from 'react'
import { useTranslation } from 'react-i18next'
import { NavLink, useLocation, useNavigate } from 'react-router-dom'
import { Plus } from 'lucide-react'
import { insertNode } from '../../../../shared/guide/edit'
import { emptyStep } from '../../../../shared/guide/emptyDocument'
import type { Id } from '../../../../shared/lib/ids/id'
import { Button } from '../../../components/controls/Button'
import { useDraft } from '../draftStore'
import { guideAddress, partsAddress, peopleAddress, stepAddress } from '../frame/addresses'
import { focusPlace } from '../frame/useGoToPlace'
import { useOpenDraft } from '../frame/sessionContext'
import { FindingMark } from './FindingMark'
import { OutlineDrag } from './OutlineDrag'
import { SectionRow } from './SectionRow'
import { StepRow } from './StepRow'
import { useOutlineActs } from './useOutlineActs'

/** Sections and steps in order: to go to one, and to add, move, copy, rename and remove them. */
export function Outline({ currentStep }: { currentStep: Id | null }) {
  const { t } = useTranslation('editing')
  const { guideId, findings, view } = useOpenDraft()
  const { document, edit, newId, readOnly } = useDraft()
  const navigate = useNavigate()
  const { search, key } = useLocation()
  const [open, setOpen] = useState(false)
  const [openedAt, setOpenedAt] = useState('')
  const listId = useId()
  const acts = useOutlineActs(currentStep)
  // On a phone the outline closes behind the step that was chosen, and opens for a section that a finding leads to.
  if (openedAt !== key) {
    const wanted = new URLSearchParams(search).get('node')
    setOpenedAt(key)
    setOpen(document.sections.some((section) => section.id === wanted))
  }

  const addStep = (): void => {
    const step = emptyStep(newId)
    const at = document.sections.find((section) => section.steps.some((each) => each.id === currentStep))
    const section = at ?? document.sections.at(-1)
    const place = at?.steps.findIndex((each) => each.id === currentStep)
    if (section === undefined) {
      const id = newId()
      edit((doc) => insertNode(doc, 'section', { id, title: '', steps: [step] }, null))
    } else {
      edit((doc) => insertNode(doc, 'step', step, section.id, place === undefined ? undefined : place + 1))
    }
    void navigate(`${stepAddress(guideId, step.id)}?field=title`)
  }
  const addSection = (): void => {
    const id = newId()
    edit((doc) => insertNode(doc, 'section', { id, title: '', steps: [] }, null))
    setTimeout(() => focusPlace(id, 'title'))
  }

  return (
    <nav className="draft-outline" aria-label={t('outline.name')} data-open={open || undefined}>
      <p className="label outline-name">{t('outline.name')}</p>
      <Button
        className="outline-toggle"
        aria-expanded={open}
        aria-controls={listId}
        onClick={() => setOpen(!open)}
      >
        {t('outline.toggle')}
      </Button>
      <div className="outline-list" id={listId}>
        <ul className="outline-places">
          <li>
            <NavLink to={guideAddress(guideId)}>{t('place.guide')}</NavLink>
            <FindingMark findings={findings.filter(({ place }) => place.page === 'guide')} />
          </li>
          <li>
            <NavLink to={partsAddress(guideId)}>{t('place.parts')}</NavLink>
            <FindingMark findings={findings.filter(({ place }) => place.page === 'parts')} />
          </li>
          {view.guide.roles.includes('owner') && (
            <li>
              <NavLink to={peopleAddress(guideId)}>{t('place.people')}</NavLink>
            </li>
          )}
        </ul>
        <OutlineDrag onDrop={acts.drop}>
          {document.sections.map((section) => (
            <section key={section.id} className="outline-section" data-node={section.id}>
              <SectionRow section={section} acts={acts} />
              <ol>
                {section.steps.map((step) => (
                  <StepRow
                    key={step.id}
                    step={step}
                    acts={acts}
                    current={step.id === currentStep}
                    findings={findings.filter(({ place }) => place.step === step.id)}
                  />
                ))}
              </ol>
            </section>
          ))}
        </OutlineDrag>
        {!readOnly && (
          <div className="outline-add">
            <Button kind="quiet" onClick={addStep}>
              <Plus size={16} aria-hidden />
              {t('outline.addStep')}
            </Button>
            <Button kind="quiet" onClick={addSection}>
              <Plus size={16} aria-hidden />
              {t('outline.addSection')}
            </Button>
          </div>
        )}
      </div>
    </nav>
  )
}
