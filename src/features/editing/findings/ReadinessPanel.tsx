import { useTranslation } from 'react-i18next'
import type { Id } from '../../../../shared/lib/ids/id'
import { useDraft } from '../draftStore'
import { stepsOf } from '../../../../shared/guide/stepsOf'
import { FindingList } from './FindingList'
import { localeOf } from '../../../lib/localeOf'

/** Beside the page that is edited: what must and should be mended in the whole guide, and this step in short. */
export function ReadinessPanel({ stepId }: { stepId: Id | null }) {
  const { t } = useTranslation('editing')
  return (
    <aside className="readiness" aria-label={t('findings.name')}>
      <p className="label">{t('findings.name')}</p>
      <FindingList />
      {stepId !== null && <ThisStep stepId={stepId} />}
    </aside>
  )
}

function ThisStep({ stepId }: { stepId: Id }) {
  const { t, i18n } = useTranslation('editing')
  const { document } = useDraft()
  const step = stepsOf(document).find((each) => each.id === stepId)
  if (step === undefined) return null
  const tools = document.tools.filter((tool) => step.tools.includes(tool.id)).map((tool) => tool.name)
  const people = t('step.peopleCount', { count: step.people })
  return (
    <>
      <h2 className="label mt-6">{t('findings.thisStep')}</h2>
      <p className="mt-1">
        {step.minutes === null
          ? people
          : t('step.timeAndPeople', { minutes: t('step.minutesCount', { count: step.minutes }), people })}
      </p>
      {tools.length > 0 && (
        <p dir="auto">
          {t('step.toolsAre', { tools: new Intl.ListFormat(localeOf(i18n.language)).format(tools) })}
        </p>
      )}
    </>
  )
}
