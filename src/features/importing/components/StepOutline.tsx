import { useTranslation } from 'react-i18next'
import { fileAddress } from '../../../../shared/api/files'
import type {
  Understanding,
  UnderstoodFigure,
  UnderstoodSection,
  UnderstoodStep,
} from '../../../../shared/api/imports'
import { Button } from '../../../components/controls/Button'
import { Checkbox } from '../../../components/controls/Checkbox'
import { TextField } from '../../../components/controls/TextField'
import { beginSection, joinToBefore, setPiece, type Change } from '../changeUnderstanding'
import { plainText, type Words } from '../../../../shared/guide/plainText'

/** Placeholder ids name nothing yet. */
const NO_NAMES: Words = { line: () => '', figure: () => '', step: () => '' }

type Edit = (change: Change) => void

/** Sections and steps as they were understood: on or off, renamed, joined, a section begun. Pictures and offered quantities below each. */
export function StepOutline({ understanding, edit }: { understanding: Understanding; edit: Edit }) {
  const { t } = useTranslation('importing')
  return (
    <section className="understood-part">
      <div className="head">
        <h2>{t('steps')}</h2>
        <p className="note">{t('stepsHint')}</p>
      </div>
      {understanding.sections.length === 0 && <p className="note">{t('noSteps')}</p>}
      {understanding.sections.map((section) => (
        <SectionPart key={section.key} section={section} understanding={understanding} edit={edit} />
      ))}
    </section>
  )
}

function SectionPart({
  section,
  understanding,
  edit,
}: {
  section: UnderstoodSection
  understanding: Understanding
  edit: Edit
}) {
  const { t } = useTranslation('importing')
  return (
    <details className="understood-section" open={section.include}>
      <summary>
        {section.title === '' ? t('untitledSection') : section.title}{' '}
        <small>
          {section.from}; {t('sum.steps', { count: section.steps.filter(({ include }) => include).length })}
        </small>
      </summary>
      <div className="piece-head">
        <Checkbox
          label={t('takeSection')}
          checked={section.include}
          onChange={(event) => edit(setPiece(section.key, { include: event.target.checked }))}
        />
        <TextField
          label={t('sectionTitle')}
          hideLabel
          value={section.title}
          maxLength={300}
          onChange={(event) => edit(setPiece(section.key, { title: event.target.value }))}
        />
      </div>
      <ol className="understood-steps">
        {section.steps.map((step, index) => (
          <li key={step.key}>
            <StepPart step={step} first={index === 0} understanding={understanding} edit={edit} />
          </li>
        ))}
      </ol>
    </details>
  )
}

function StepPart({
  step,
  first,
  understanding,
  edit,
}: {
  step: UnderstoodStep
  first: boolean
  understanding: Understanding
  edit: Edit
}) {
  const { t } = useTranslation('importing')
  const text = plainText(step.body, NO_NAMES).trim()
  return (
    <>
      <div className="piece-head">
        <Checkbox
          label={t('takeStep')}
          hideLabel
          checked={step.include}
          onChange={(event) => edit(setPiece(step.key, { include: event.target.checked }))}
        />
        <TextField
          label={t('stepTitle')}
          hideLabel
          value={step.title}
          maxLength={300}
          onChange={(event) => edit(setPiece(step.key, { title: event.target.value }))}
        />
        {!first && (
          <>
            <Button kind="quiet" className="small" onClick={() => edit(joinToBefore(step.key))}>
              {t('join')}
            </Button>
            <Button kind="quiet" className="small" onClick={() => edit(beginSection(step.key))}>
              {t('beginSection')}
            </Button>
          </>
        )}
      </div>
      {text !== '' && (
        <p className="note excerpt">
          {text.slice(0, 220)}
          {text.length > 220 && '…'}
        </p>
      )}
      {step.figures.length > 0 && (
        <ul className="thumbs">
          {step.figures.map((figure) => (
            <Thumb key={figure.key} figure={figure} edit={edit} />
          ))}
        </ul>
      )}
      {step.uses.length > 0 && (
        <fieldset className="offers">
          <legend className="label">{t('uses')}</legend>
          {step.uses.map((use) => (
            <Checkbox
              key={use.key}
              label={`${use.typed} ${understanding.lines.find(({ key }) => key === use.lineKey)?.name ?? ''}`}
              description={use.sentence === null ? undefined : `“${use.sentence}”`}
              checked={use.include}
              onChange={(event) => edit(setPiece(use.key, { include: event.target.checked }))}
            />
          ))}
        </fieldset>
      )}
      {step.cautions.length > 0 && (
        <fieldset className="offers">
          <legend className="label">{t('cautions')}</legend>
          {step.cautions.map((caution) => (
            <Checkbox
              key={caution.key}
              label={`${t(`guide:signal.${caution.signal}`)}: ${caution.text}`}
              checked={caution.include}
              onChange={(event) => edit(setPiece(caution.key, { include: event.target.checked }))}
            />
          ))}
        </fieldset>
      )}
    </>
  )
}

function Thumb({ figure, edit }: { figure: UnderstoodFigure; edit: Edit }) {
  const { t } = useTranslation('importing')
  const name = figure.path.split('/').at(-1) ?? figure.path
  return (
    <li>
      {figure.state === 'found' && figure.sha256 !== null ? (
        <img
          src={fileAddress(figure.sha256, 'webp-480')}
          alt={figure.alt}
          width={120}
          height={90}
          loading="lazy"
        />
      ) : (
        <span className="no-picture">{t(`picture.${figure.state}`)}</span>
      )}
      <Checkbox
        label={name}
        checked={figure.include}
        onChange={(event) => edit(setPiece(figure.key, { include: event.target.checked }))}
      />
    </li>
  )
}
