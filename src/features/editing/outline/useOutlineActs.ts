import { useTranslation } from 'react-i18next'
import { useNavigate } from 'react-router-dom'
import { copyStep } from '../../../../shared/guide/copyStep'
import { insertNode, moveNode, setNode } from '../../../../shared/guide/edit'
import { emptyStep } from '../../../../shared/guide/emptyDocument'
import { numbering } from '../../../../shared/guide/numbering'
import { removeWithReferences } from '../../../../shared/guide/removeWithReferences'
import { stepsOf } from '../../../../shared/guide/stepsOf'
import type { GuideDocument, Section, Step } from '../../../../shared/guide/schema'
import type { Id } from '../../../../shared/lib/ids/id'
import { useDraft } from '../draftStore'
import { guideAddress, stepAddress } from '../frame/addresses'
import { useOpenDraft } from '../frame/sessionContext'
import { focusPlace, type GoingTo } from '../frame/useGoToPlace'
import { drop, nudgeSection, nudgeStep, placeOf, type Drop } from './moveInOutline'

export interface OutlineActs {
  nudge: (kind: 'step' | 'section', id: Id, by: -1 | 1) => void
  moveTo: (stepId: Id, sectionId: Id) => void
  drop: (what: Drop) => void
  addAfter: (sectionId: Id, index: number) => void
  copy: (step: Step) => void
  rename: (sectionId: Id, title: string) => void
  removeStep: (step: Step) => void
  removeSection: (section: Section) => void
}

/** What the outline can do, each with where the focus goes and what is announced. */
export function useOutlineActs(currentStep: Id | null): OutlineActs {
  const { t } = useTranslation('editing')
  const { document, edit, newId, announce, numbers } = useDraft()
  const { guideId, sayDone } = useOpenDraft()
  const navigate = useNavigate()
  /** The focus stays in the outline. */
  const stay = (id: Id): void => void setTimeout(() => focusPlace(`outline-${id}`, null))

  const moved = (kind: 'step' | 'section', id: Id, after: GuideDocument): void => {
    if (after === document) {
      announce(t('outline.noFurther'))
      return
    }
    edit(() => after)
    announce(movedSentence(kind, id, after))
    stay(id)
  }
  const movedSentence = (kind: 'step' | 'section', id: Id, after: GuideDocument): string => {
    const now = numbering(after)
    if (kind === 'section') return t('outline.sectionMoved', { letter: now.section[id] })
    const section = after.sections[placeOf(after, id)?.section ?? 0]
    return t('outline.stepMoved', {
      number: now.step[id],
      letter: section === undefined ? '' : now.section[section.id],
    })
  }
  const leave = (after: GuideDocument, gone: readonly Id[]): void => {
    const before = stepsOf(document)
    const at = before.findIndex((step) => gone.includes(step.id))
    const rest = stepsOf(after)
    const next = rest[Math.min(Math.max(at, 0), rest.length - 1)]
    if (currentStep === null || !gone.includes(currentStep)) {
      if (next !== undefined) stay(next.id)
      return
    }
    if (next === undefined) void navigate(guideAddress(guideId))
    else {
      const state: GoingTo = { focus: `outline-${next.id}` }
      void navigate(stepAddress(guideId, next.id), { state })
    }
  }

  return {
    nudge: (kind, id, by) =>
      moved(kind, id, kind === 'step' ? nudgeStep(document, id, by) : nudgeSection(document, id, by)),
    moveTo: (stepId, sectionId) => {
      const end = document.sections.find((section) => section.id === sectionId)?.steps.length ?? 0
      moved('step', stepId, moveNode(document, 'step', stepId, sectionId, end))
    },
    drop: (what) => {
      const after = drop(document, what)
      if (after !== document) moved(what.kind, what.id, after)
    },
    addAfter: (sectionId, index) => {
      const step = emptyStep(newId)
      edit((doc) => insertNode(doc, 'step', step, sectionId, index))
      void navigate(`${stepAddress(guideId, step.id)}?field=title`)
    },
    copy: (step) => {
      const copied = copyStep(document, step.id, newId)
      if (copied === undefined) return
      edit(() => copied.document)
      announce(t('outline.copied', { number: numbers.step[step.id] }))
      void navigate(`${stepAddress(guideId, copied.copy)}?field=title`)
    },
    rename: (sectionId, title) =>
      edit((doc) => setNode(doc, 'section', sectionId, { title }), `section.title.${sectionId}`),
    removeStep: (step) => {
      const after = removeWithReferences(document, 'step', step.id)
      edit(() => after)
      sayDone(t('outline.stepRemoved', { number: numbers.step[step.id], title: step.title }))
      leave(after, [step.id])
    },
    removeSection: (section) => {
      const after = removeWithReferences(document, 'section', section.id)
      edit(() => after)
      sayDone(
        t('outline.sectionRemoved', { letter: numbers.section[section.id], count: section.steps.length }),
      )
      leave(
        after,
        section.steps.map((step) => step.id),
      )
    },
  }
}
