import type { GuideData } from '../../../shared/api/pages'
import { stepsOf } from '../../../shared/guide/stepsOf'
import { CautionView, WearList } from '../../components/reading/CautionView'
import { FigureView } from '../../components/reading/FigureView'
import { useGuide } from '../../components/reading/guideView'
import { QuantityView } from '../../components/reading/QuantityView'
import { Duration } from '../../components/reading/StepView'
import { useOwnLanguage, useWords } from '../../components/reading/useWords'
import { baseOf, GuideFrame } from './GuideFrame'
import { RevisionTable } from './RevisionsPage'

/** The title page: what it is, what shows that it works, what it takes, what to beware of, and its history. */
export function FrontPage({ guide }: { guide: GuideData }) {
  return (
    <GuideFrame guide={guide} place="front">
      <Opening guide={guide} />
      <Before />
      <Needs guide={guide} />
      <Contents guide={guide} />
      <History guide={guide} />
    </GuideFrame>
  )
}

function Opening({ guide }: { guide: GuideData }) {
  const { t } = useWords()
  const own = useOwnLanguage()
  const { doc, numbers } = useGuide()
  return (
    <>
      <h1 className="t6 front-title" {...own}>
        {doc.title}
      </h1>
      <div className="opening">
        <div className="opening-text">
          <p className="lede" {...own}>
            {doc.summary}
          </p>
          {doc.front !== null && <FigureView id={doc.front} eager />}
        </div>
        <div className="opening-facts">
          <p className="actions">
            <a className="button go" href={`${baseOf(guide)}/steps/1`}>
              {t('beginReading')}
            </a>
            <a className="button" href={`${baseOf(guide)}/steps`}>
              {t('allSteps', { count: numbers.steps })}
            </a>
          </p>
          <Figures />
        </div>
      </div>
    </>
  )
}

/** What it does, with the evidence named, and how long it takes. */
function Figures() {
  const { t } = useWords()
  const own = useOwnLanguage()
  const { doc } = useGuide()
  const steps = stepsOf(doc)
  const minutes = steps.reduce((sum, step) => sum + (step.minutes ?? 0), 0)
  const untimed = steps.filter((step) => step.minutes === null).length
  const people = Math.max(1, ...steps.map((step) => step.people))
  return (
    <dl className="big-facts">
      {doc.claims.map((claim) => (
        <div key={claim.id}>
          <dt>
            <span {...own}>{claim.label}</span>, {t(`evidence.${claim.evidence.kind}`)}
          </dt>
          <dd>
            <b>
              <QuantityView
                value={claim.quantity.value}
                unit={claim.quantity.unit}
                plusMinus={claim.quantity.uncertainty}
              />
            </b>
            <small {...own}>
              {claim.conditions}
              {claim.evidence.kind !== 'none' && claim.evidence.text !== '' && `; ${claim.evidence.text}`}
            </small>
          </dd>
        </div>
      ))}
      {minutes > 0 && (
        <div>
          <dt>{t('time')}</dt>
          <dd>
            <b>
              <Duration minutes={minutes} />
            </b>
            <small>
              {people > 1 ? t('upToPeople', { count: people }) : t('people', { count: 1 })}
              {untimed > 0 && `; ${t('untimed', { count: untimed })}`}
            </small>
          </dd>
        </div>
      )}
      <div>
        <dt>{t('place.parts')}</dt>
        <dd>
          <b className="num">{doc.lines.length}</b>
          <small>
            {t('ofThemPrinted', { count: doc.lines.filter(({ kind }) => kind === 'printed').length })}
          </small>
        </dd>
      </div>
    </dl>
  )
}

function Before() {
  const { t } = useWords()
  const { doc } = useGuide()
  const steps = stepsOf(doc)
  const wear = [
    ...new Set(
      [...doc.cautions, ...steps.flatMap(({ cautions }) => cautions)].flatMap((caution) => caution.wear),
    ),
  ].sort()
  return (
    <section className="row chapter">
      <h2 className="margin plain">{t('beforeYouBegin')}</h2>
      <div className="text stack">
        {doc.cautions.map((caution) => (
          <CautionView key={caution.id} caution={caution} />
        ))}
        <p>{t('localCodes')}</p>
      </div>
      {wear.length > 0 && (
        <div className="side">
          <h3 className="label">{t('protectiveEquipment')}</h3>
          <WearList codes={wear} />
        </div>
      )}
    </section>
  )
}

function Needs({ guide }: { guide: GuideData }) {
  const { t } = useWords()
  const own = useOwnLanguage()
  const { doc, whole } = useGuide()
  const steps = stepsOf(doc)
  // A tool that only steps with a substitute need is not asked for; one that no step names is, without a count.
  const elsewhere = new Set(stepsOf(whole).flatMap((step) => step.tools))
  const tools = doc.tools
    .map((tool) => ({ tool, count: steps.filter((step) => step.tools.includes(tool.id)).length }))
    .filter(({ tool, count }) => count > 0 || !elsewhere.has(tool.id))
    .sort((a, b) => b.count - a.count)
  return (
    <section className="chapter">
      <div className="head">
        <h2>{t('whatYouNeed')}</h2>
        <p className="note">{t('readFromSteps', { count: steps.length })}</p>
      </div>
      <div className="thirds">
        <div>
          <h3 className="label">{t('tools')}</h3>
          {tools.length === 0 && <p className="note">{t('noTools')}</p>}
          <ul className="pairs">
            {tools.map(({ tool, count }) => (
              <li key={tool.id}>
                <span {...own}>{tool.name}</span> {count > 0 && <span>{t('stepCount', { count })}</span>}
              </li>
            ))}
          </ul>
        </div>
        <div>
          <h3 className="label">{t('skills')}</h3>
          {doc.skills.length === 0 && <p className="note">{t('noSkills')}</p>}
          <ul className="pairs">
            {doc.skills.map((skill) => (
              <li key={skill.id} {...own}>
                {skill.name}
              </li>
            ))}
          </ul>
        </div>
        <div>
          <h3 className="label">{t('partsAndModels')}</h3>
          <ul className="pairs">
            <li>
              <a href={`${baseOf(guide)}/parts`}>{t('lineCount', { count: doc.lines.length })}</a>
            </li>
            {doc.models.length > 0 && (
              <li>
                <a href={`${baseOf(guide)}/models`}>{t('modelCount', { count: doc.models.length })}</a>
              </li>
            )}
          </ul>
        </div>
      </div>
    </section>
  )
}

/** Sections and steps, so that the whole road is seen before the first cut. */
function Contents({ guide }: { guide: GuideData }) {
  const { t } = useWords()
  const own = useOwnLanguage()
  const { doc, numbers } = useGuide()
  return (
    <section className="chapter">
      <div className="head">
        <h2>{t('howItIsBuilt')}</h2>
        <p className="note">
          <a href={`${baseOf(guide)}/steps`}>{t('allOnOnePage')}</a>
        </p>
      </div>
      <div className="thirds">
        {doc.sections.map((section) => (
          <div key={section.id}>
            <h3 className="label">
              {numbers.section[section.id]} <span {...own}>{section.title}</span>
            </h3>
            <ol className="pairs">
              {section.steps.map((step) => (
                <li key={step.id}>
                  <span className="num graphite">{numbers.step[step.id]}</span>
                  <a className="grow" href={`${baseOf(guide)}/steps/${numbers.step[step.id]}`} {...own}>
                    {step.title}
                  </a>
                  {step.minutes !== null && <Duration minutes={step.minutes} />}
                </li>
              ))}
            </ol>
          </div>
        ))}
      </div>
    </section>
  )
}

function History({ guide }: { guide: GuideData }) {
  const { t, isolated } = useWords()
  const own = useOwnLanguage()
  const { doc } = useGuide()
  return (
    <section className="chapter">
      <div className="head">
        <h2>{t('place.revisions')}</h2>
        <p className="note">{t('neverChanges')}</p>
      </div>
      <RevisionTable guide={guide} />
      <div className="thirds">
        <div>
          <h3 className="label">{t('licence')}</h3>
          <p className="note">
            <a
              href={`https://spdx.org/licenses/${encodeURIComponent(doc.licence)}.html`}
              rel="license noreferrer"
            >
              {doc.licence}
            </a>
          </p>
        </div>
        {doc.credits.length > 0 && (
          <div>
            <h3 className="label">{t('credits')}</h3>
            <ul className="pairs" {...own}>
              {doc.credits.map((credit) => (
                <li key={credit.id}>
                  <span>{credit.name}</span> <span>{credit.role}</span>
                </li>
              ))}
            </ul>
          </div>
        )}
        <div>
          <h3 className="label">{t('toKeep')}</h3>
          <p className="note">
            <a href={`/guides/${guide.slug}/revisions/${guide.revision.label}`}>
              {t('addressForEver', { label: isolated(guide.revision.label) })}
            </a>
          </p>
          <p className="note">
            <a href={`/guides/${guide.slug}/feed.atom`}>{t('feed')}</a>
          </p>
        </div>
      </div>
    </section>
  )
}
