import type { LibraryData, LibraryEntry, LibraryQuestion } from '../../../shared/api/pages'
import { fileAddress } from '../../../shared/api/files'
import { QuantityView } from '../../components/reading/QuantityView'
import { Duration } from '../../components/reading/StepView'
import { ownLanguage } from '../../components/reading/guideView'
import { useWords } from '../../components/reading/useWords'

/** The library: a field to ask in, what narrows it in the margin, and a ruled catalogue. */
export function LibraryPage({ library }: { library: LibraryData }) {
  const { t } = useWords()
  const { question } = library
  return (
    <main id="text" className="sheet">
      <h1 className="t4 page-title">{t('findAGuide')}</h1>
      <form className="find" role="search" action="/guides">
        <label className="visually-hidden" htmlFor="q">
          {t('whatShouldItDo')}
        </label>
        <input
          className="input"
          type="search"
          id="q"
          name="q"
          defaultValue={question.q}
          placeholder={t('whatShouldItDo')}
          maxLength={200}
        />
        <Hidden question={question} except={['q', 'page']} />
        <button className="button" type="submit">
          {t('find')}
        </button>
      </form>
      <div className="library">
        <Narrow library={library} />
        <div>
          <div className="found">
            <p>
              <b>{t('guideCount', { count: library.total })}</b>{' '}
              {question.q !== '' && t('with', { q: question.q })}
            </p>
            <p className="note to-facets">
              <a href="#narrow">{t('narrow')}</a>
            </p>
            <p className="note">
              {t('inOrderOf')} {question.sort === 'date' ? t('date') : t('title')};{' '}
              <a href={address(question, { sort: question.sort === 'date' ? 'title' : 'date', page: 1 })}>
                {question.sort === 'date' ? t('byTitle') : t('byDate')}
              </a>
            </p>
          </div>
          {library.entries.length === 0 ? (
            <Empty question={question} />
          ) : (
            <ul className="catalogue">
              {library.entries.map((entry) => (
                <Entry key={entry.slug} entry={entry} />
              ))}
            </ul>
          )}
          <Pages library={library} />
        </div>
      </div>
    </main>
  )
}

/** The address of the library for a question; what is not asked is not in it. */
function address(question: LibraryQuestion, change: Partial<LibraryQuestion>): string {
  const asked = { ...question, ...change }
  const search = new URLSearchParams()
  if (asked.q !== '') search.set('q', asked.q)
  if (asked.machine !== '') search.set('machine', asked.machine)
  if (asked.language !== '') search.set('language', asked.language)
  if (asked.skill !== '') search.set('skill', asked.skill)
  if (asked.tool !== '') search.set('tool', asked.tool)
  if (asked.sort !== 'date') search.set('sort', asked.sort)
  if (asked.page > 1) search.set('page', String(asked.page))
  const text = search.toString()
  return text === '' ? '/guides' : `/guides?${text}`
}

function Hidden({ question, except }: { question: LibraryQuestion; except: (keyof LibraryQuestion)[] }) {
  return Object.entries(question)
    .filter(
      ([name, value]) => !except.includes(name as keyof LibraryQuestion) && value !== '' && value !== 'date',
    )
    .map(([name, value]) => <input key={name} type="hidden" name={name} value={value} />)
}

function Narrow({ library }: { library: LibraryData }) {
  const { t, language } = useWords()
  const { question } = library
  const names = new Intl.DisplayNames(language, { type: 'language' })
  return (
    <nav className="facets" id="narrow" aria-label={t('narrow')}>
      <Facet
        title={t('kindOfMachine')}
        chosen={question.machine}
        choices={library.machines.map(({ value, count }) => ({
          value,
          count,
          text: t(`guide:machine.${value}`),
        }))}
        to={(machine) => address(question, { machine, page: 1 })}
      />
      <Facet
        title={t('language')}
        chosen={question.language}
        choices={library.languages.map(({ value, count }) => ({
          value,
          count,
          text: names.of(value) ?? value,
        }))}
        to={(chosen) => address(question, { language: chosen, page: 1 })}
      />
      <Facet
        title={t('skill')}
        chosen={question.skill}
        choices={library.skills.map((skill) => ({ ...skill, text: skill.value }))}
        to={(skill) => address(question, { skill, page: 1 })}
      />
      <Facet
        title={t('tool')}
        chosen={question.tool}
        choices={library.tools.map((tool) => ({ ...tool, text: tool.value }))}
        to={(tool) => address(question, { tool, page: 1 })}
      />
    </nav>
  )
}

function Facet(props: {
  title: string
  chosen: string
  choices: { value: string; count: number; text: string }[]
  to: (value: string) => string
}) {
  const { t } = useWords()
  if (props.choices.length < 2 && props.chosen === '') return null
  return (
    <section>
      <h2 className="label">{props.title}</h2>
      <ul>
        {props.choices.map(({ value, count, text }) => (
          <li key={value}>
            <a
              href={props.to(value === props.chosen ? '' : value)}
              aria-current={value === props.chosen ? 'true' : undefined}
            >
              <bdi>{text}</bdi>
            </a>
            <span className="num">{count}</span>
          </li>
        ))}
        {props.chosen !== '' && (
          <li className="all">
            <a href={props.to('')}>{t('all')}</a>
          </li>
        )}
      </ul>
    </section>
  )
}

function Entry({ entry }: { entry: LibraryEntry }) {
  const { t, language, date, isolated } = useWords()
  const own = ownLanguage(entry.lang, language)
  return (
    <li>
      <div className="entry-picture">
        {entry.picture !== null && (
          <img
            className={entry.picture.rendition === 'still' ? 'drawing' : undefined}
            src={fileAddress(entry.picture.sha256, entry.picture.rendition)}
            width={entry.picture.width}
            height={entry.picture.height}
            alt=""
            loading="lazy"
          />
        )}
      </div>
      <div>
        <h2 className="t2" {...own}>
          <a href={`/guides/${entry.slug}`}>{entry.title}</a>
        </h2>
        <p className="note">
          {entry.byline} ·{' '}
          {t('revisionDated', { label: isolated(entry.label), date: date(entry.publishedAt) })}
        </p>
        <p {...own}>{entry.summary}</p>
      </div>
      <dl className="facts">
        {entry.claim !== null && (
          <>
            <dt>{t(`evidenceShort.${entry.claim.evidence.kind}`)}</dt>
            <dd>
              <b>
                <QuantityView value={entry.claim.quantity.value} unit={entry.claim.quantity.unit} />
              </b>{' '}
              <span {...own}>{entry.claim.label}</span>
            </dd>
          </>
        )}
        {entry.minutes > 0 && (
          <>
            <dt>{t('time')}</dt>
            <dd>
              <Duration minutes={entry.minutes} />
            </dd>
          </>
        )}
        <dt>{t('place.steps')}</dt>
        <dd className="num">{entry.steps}</dd>
        <dt>{t('place.parts')}</dt>
        <dd className="num">{entry.lines}</dd>
      </dl>
    </li>
  )
}

function Empty({ question }: { question: LibraryQuestion }) {
  const { t } = useWords()
  const asked = address(question, { sort: 'date', page: 1 }) !== '/guides'
  return (
    <div className="empty">
      <p>{asked ? t('nothingFound') : t('libraryEmpty')}</p>
      <p>
        <a className="button" href={asked ? '/guides' : '/drafts'}>
          {asked ? t('showAll') : t('startOne')}
        </a>
      </p>
    </div>
  )
}

function Pages({ library }: { library: LibraryData }) {
  const { t } = useWords()
  const { question, total, pageSize } = library
  const last = Math.max(1, Math.ceil(total / pageSize))
  if (last === 1) return null
  return (
    <nav className="actions pages" aria-label={t('pages')}>
      {question.page > 1 && (
        <a className="button" rel="prev" href={address(question, { page: question.page - 1 })}>
          {t('earlierPage')}
        </a>
      )}
      <span className="note">{t('pageOf', { page: question.page, last })}</span>
      {question.page < last && (
        <a className="button" rel="next" href={address(question, { page: question.page + 1 })}>
          {t('laterPage')}
        </a>
      )}
    </nav>
  )
}
