import type { GuideData } from '../../../shared/api/pages'
import type { Step } from '../../../shared/guide/schema'
import { stepsOf } from '../../../shared/guide/stepsOf'
import { Chain } from '../../components/reading/Chain'
import { GuideReading } from '../../components/reading/GuideReading'
import { useGuide } from '../../components/reading/guideView'
import { StepView } from '../../components/reading/StepView'
import { useOwnLanguage, useWords } from '../../components/reading/useWords'
import { baseOf, GuideFrame } from './GuideFrame'

const NEAR = 3

/** One step on a page of its own. */
export function StepPage({ guide, step }: { guide: GuideData; step: number }) {
  return (
    <GuideFrame guide={guide} place="steps" step={step}>
      <OneStep guide={guide} number={step} />
    </GuideFrame>
  )
}

function OneStep({ guide, number }: { guide: GuideData; number: number }) {
  const { t } = useWords()
  const { doc, numbers } = useGuide()
  const steps = stepsOf(doc)
  const here = steps.filter((step) => numbers.step[step.id] === number)
  const left = steps
    .filter((step) => numbers.step[step.id]! >= number)
    .reduce((sum, step) => sum + (step.minutes ?? 0), 0)
  const done = steps
    .filter((step) => numbers.step[step.id]! < number)
    .reduce((sum, step) => sum + (step.minutes ?? 0), 0)
  return (
    <>
      <div className="progress">
        <Chain
          parts={[
            ...(number > 1
              ? [
                  {
                    share: done,
                    text: t('before', { count: number - 1, steps: numbers.steps }),
                    state: 'on' as const,
                  },
                ]
              : []),
            { share: left, text: t('toGo', { hours: Math.floor(left / 60), minutes: left % 60 }) },
          ]}
        />
      </div>
      {here.map((step) => (
        <StepView key={step.id} id={step.id} level={1} eager>
          <Nearby guide={guide} number={number} steps={steps} />
        </StepView>
      ))}
      <Neighbours guide={guide} number={number} steps={steps} />
    </>
  )
}

/** In the margin of a desk: the steps round this one, so that one sees where it stands. */
function Nearby({ guide, number, steps }: { guide: GuideData; number: number; steps: readonly Step[] }) {
  const own = useOwnLanguage()
  const { numbers } = useGuide()
  const { t } = useWords()
  const near = steps.filter((step) => Math.abs(numbers.step[step.id]! - number) <= NEAR)
  return (
    <nav className="nearby" aria-label={t('nearbySteps')}>
      <ol>
        {near.map((step) => {
          const at = numbers.step[step.id]!
          return (
            <li key={step.id}>
              <a href={`${baseOf(guide)}/steps/${at}`} aria-current={at === number ? 'step' : undefined}>
                <span {...own}>{step.title}</span>
                <b className="num">{at}</b>
              </a>
            </li>
          )
        })}
      </ol>
    </nav>
  )
}

function Neighbours({ guide, number, steps }: { guide: GuideData; number: number; steps: readonly Step[] }) {
  const { t } = useWords()
  const own = useOwnLanguage()
  const { numbers } = useGuide()
  const at = (wanted: number): Step | undefined => steps.find((step) => numbers.step[step.id] === wanted)
  const before = at(number - 1)
  const after = at(number + 1)
  const address = (wanted: number): string => `${baseOf(guide)}/steps/${wanted}`
  return (
    <nav className="row neighbours" aria-label={t('otherSteps')}>
      <div className="text actions">
        {before !== undefined && (
          <a className="button" rel="prev" href={address(number - 1)}>
            {t('stepNumber', { number: number - 1 })}: <span {...own}>{before.title}</span>
          </a>
        )}
        {after === undefined ? (
          <a className="button" href={baseOf(guide)}>
            {t('backToFront')}
          </a>
        ) : (
          <a className="button go" rel="next" href={address(number + 1)}>
            {t('stepNumber', { number: number + 1 })}: <span {...own}>{after.title}</span>
          </a>
        )}
      </div>
    </nav>
  )
}

/** All steps on one page: for printing, for searching within, for a shed without network. */
export function AllStepsPage({ guide }: { guide: GuideData }) {
  const { t } = useWords()
  return (
    <GuideFrame guide={guide} place="steps">
      <h1 className="t4 page-title">{t('place.steps')}</h1>
      <Jump />
      <GuideReading />
    </GuideFrame>
  )
}

function Jump() {
  const { t } = useWords()
  const own = useOwnLanguage()
  const { doc, numbers } = useGuide()
  return (
    <details className="jump">
      <summary>{t('stepCount', { count: numbers.steps })}</summary>
      <ol className="pairs" {...own}>
        {stepsOf(doc).map((step) => (
          <li key={step.id}>
            <span className="num graphite">{numbers.step[step.id]}</span>
            <a className="grow" href={`#${step.id}`}>
              {step.title}
            </a>
          </li>
        ))}
      </ol>
    </details>
  )
}
