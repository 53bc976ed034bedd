import type { ReactNode } from 'react'
import type { Id } from '../../../shared/lib/ids/id'
import { CautionView } from './CautionView'
import { CheckView } from './CheckView'
import { FigureView } from './FigureView'
import { useGuide } from './guideView'
import { InHand } from './InHand'
import { RichTextView } from './RichTextView'
import { useOwnLanguage, useWords } from './useWords'

/**
 * One step as a maker reads it. The order in the source is the order on a phone: number and title, parts and tools, cautions, then the
 * instruction that needs them. A title is a heading of `level`.
 */
export function StepView({
  id,
  level = 2,
  eager = false,
  children,
}: {
  id: Id
  level?: 1 | 2
  eager?: boolean
  /** What else stands in the margin, on a desk. */
  children?: ReactNode
}) {
  const { t } = useWords()
  const own = useOwnLanguage()
  const { doc, numbers } = useGuide()
  const section = doc.sections.find(({ steps }) => steps.some((candidate) => candidate.id === id))
  const step = section?.steps.find((candidate) => candidate.id === id)
  if (section === undefined || step === undefined) return null
  const Title = level === 1 ? 'h1' : 'h2'
  const beside = step.uses.length + step.tools.length + step.models.length > 0
  return (
    <article className="row step" id={step.id}>
      <div className="margin">
        <p className="step-number" aria-hidden="true">
          {numbers.step[step.id]}
        </p>
        <p>
          {t('section', { letter: numbers.section[section.id] })}
          {section.title !== '' && (
            <>
              <br /> <span {...own}>{section.title}</span>
            </>
          )}
        </p>
        <p>
          <Effort minutes={step.minutes} people={step.people} />
        </p>
        {children}
      </div>
      <div className="text step-title">
        <Title className="t4" {...own}>
          <span className="visually-hidden">{t('stepNumber', { number: numbers.step[step.id] })}: </span>
          {step.title}
        </Title>
      </div>
      {beside && (
        <div className="side">
          <InHand step={step} />
        </div>
      )}
      <div className="text step-body">
        {step.cautions.map((caution) => (
          <CautionView key={caution.id} caution={caution} />
        ))}
        <div className="prose" {...own}>
          <RichTextView text={step.body} />
        </div>
        {step.figures.map((figure) => (
          <FigureView key={figure} id={figure} eager={eager} />
        ))}
        {step.checks.map((check) => (
          <CheckView key={check.id} check={check} />
        ))}
      </div>
    </article>
  )
}

/** "45 min, one person". */
export function Effort({ minutes, people }: { minutes: number | null; people: number }) {
  const { t } = useWords()
  return (
    <>
      {minutes !== null && (
        <>
          <Duration minutes={minutes} />
          {t('comma')}
        </>
      )}
      {t('people', { count: people })}
    </>
  )
}

/** "5 h 10 min". */
export function Duration({ minutes }: { minutes: number }) {
  const hours = Math.floor(minutes / 60)
  const rest = minutes % 60
  return (
    <span className="num nowrap" dir="ltr">
      {hours > 0 && (
        <>
          {hours}
          <span className="unit">h</span>
        </>
      )}
      {hours > 0 && rest > 0 && ' '}
      {(rest > 0 || hours === 0) && (
        <>
          {rest}
          <span className="unit">min</span>
        </>
      )}
    </span>
  )
}
