import type { KeyboardEvent } from 'react'
import { useTranslation } from 'react-i18next'
import { Ellipsis } from 'lucide-react'
import type { Section } from '../../../../shared/guide/schema'
import { Menu } from '../../../components/controls/Menu'
import { GuideText } from '../fields/GuideText'
import { useDraft } from '../draftStore'
import { focusPlace } from '../frame/useGoToPlace'
import { nudgeBy } from './nudgeBy'
import { useRowDrag } from './OutlineDrag'
import type { OutlineActs } from './useOutlineActs'

/** The heading of a section in the outline; its title is written in place. */
export function SectionRow({ section, acts }: { section: Section; acts: OutlineActs }) {
  const { t } = useTranslation('editing')
  const { numbers, document, readOnly } = useDraft()
  const letter = numbers.section[section.id] ?? ''
  const name = t('outline.sectionName', { letter, title: section.title })
  const { setNode, grip, landing } = useRowDrag({ kind: 'section', id: section.id, title: name })
  const onKeyDown = (event: KeyboardEvent): void => {
    const by = nudgeBy(event)
    if (by === 0 || readOnly) return
    event.preventDefault()
    acts.nudge('section', section.id, by)
  }
  const at = document.sections.findIndex((each) => each.id === section.id)
  return (
    <div
      className="outline-row section"
      ref={setNode}
      data-landing={landing}
      data-node={`outline-${section.id}`}
      onKeyDown={onKeyDown}
    >
      {!readOnly && grip}
      <b>{letter}</b>
      <GuideText
        look="plain"
        label={t('outline.sectionTitle', { letter })}
        hideLabel
        field="title"
        placeholder={t('outline.untitledSection')}
        value={section.title}
        onChange={(title) => acts.rename(section.id, title)}
      />
      {!readOnly && (
        <Menu
          kind="quiet"
          label={t('outline.actsOf', { name })}
          actions={[
            {
              id: 'add',
              label: t('outline.addStepHere'),
              onAction: () => acts.addAfter(section.id, section.steps.length),
            },
            {
              id: 'rename',
              label: t('outline.rename'),
              onAction: () => void setTimeout(() => focusPlace(section.id, 'title'), 60),
            },
            {
              id: 'up',
              label: t('outline.up'),
              disabled: at === 0,
              onAction: () => acts.nudge('section', section.id, -1),
            },
            {
              id: 'down',
              label: t('outline.down'),
              disabled: at === document.sections.length - 1,
              onAction: () => acts.nudge('section', section.id, 1),
            },
            {
              id: 'remove',
              label: t('outline.removeSection', { count: section.steps.length }),
              onAction: () => acts.removeSection(section),
            },
          ]}
        >
          <Ellipsis size={16} aria-hidden />
        </Menu>
      )}
    </div>
  )
}
