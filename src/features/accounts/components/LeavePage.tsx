import { useQuery } from '@tanstack/react-query'
import { useState, type FormEvent } from 'react'
import { useTranslation } from 'react-i18next'
import { Link } from 'react-router-dom'
import type { Account, DeleteAccount, Leaving, LeavingGuide } from '../../../../shared/api/accounts'
import { Busy } from '../../../components/controls/Busy'
import { Button } from '../../../components/controls/Button'
import { ErrorSummary, type SummaryError } from '../../../components/controls/ErrorSummary'
import { FormSection } from '../../../components/controls/FormSection'
import { PasswordField } from '../../../components/controls/PasswordField'
import { RadioGroup } from '../../../components/controls/RadioGroup'
import { Status } from '../../../components/controls/Status'
import { TextField } from '../../../components/controls/TextField'
import { RequestProblem } from '../../../lib/request'
import { localeOf } from '../../../lib/localeOf'
import { useFieldSentence, useSentence } from '../../../lib/useSentence'
import { deleteAccount, leavingQuery } from '../api/account'
import { FormPage } from './FormPage'
import { goOn } from './goOn'

export function LeavePage({ account }: { account: Account }) {
  const { t } = useTranslation('accounts')
  const sentence = useSentence()
  const { data, error } = useQuery(leavingQuery)
  return (
    <FormPage title={t('leave.title')}>
      {error !== null && <Status kind="trouble">{sentence(error)}</Status>}
      {data === undefined ? error === null && <Busy /> : <LeaveForm account={account} leaving={data} />}
    </FormPage>
  )
}

type Choice = DeleteAccount['guides'][number]

/** What a radio's value means: an heir's id, or one of the two words that no id can be. */
const choiceOf = (guideId: string, value: string): Choice =>
  value === 'former member' || value === 'removed'
    ? { guideId, to: value }
    : { guideId, to: 'heir', userId: value }

/** One question a guide, one about the name, and the password: nothing is decided for the person. */
function LeaveForm({ account, leaving }: { account: Account; leaving: Leaving }) {
  const { t } = useTranslation('accounts')
  const sentence = useSentence()
  const fieldSentence = useFieldSentence()
  const [chosen, setChosen] = useState<Record<string, string>>({})
  const [name, setName] = useState<DeleteAccount['name']>('keep')
  const [proof, setProof] = useState('')
  const [busy, setBusy] = useState(false)
  const [failure, setFailure] = useState<unknown>(null)
  const [attempt, setAttempt] = useState(0)
  const wrong = failure instanceof RequestProblem ? (failure.details.errors ?? []) : []
  const errorOf = (...path: string[]): string | undefined => {
    const found = wrong.find((each) => each.path.join('/') === path.join('/'))
    return found === undefined ? undefined : fieldSentence(found.message)
  }
  const submit = async (event: FormEvent): Promise<void> => {
    event.preventDefault()
    setBusy(true)
    try {
      const guides = Object.entries(chosen).map(([guideId, value]) => choiceOf(guideId, value))
      await deleteAccount({ proof, guides, name })
      goOn('/guides')
    } catch (error) {
      setFailure(error)
      setAttempt((before) => before + 1)
      setBusy(false)
    }
  }
  const summary: SummaryError[] = wrong.map(({ path, message }) => ({
    fieldId: `leave-${path.at(-1)}`,
    label: leaving.guides.find(({ guideId }) => guideId === path.at(-1))?.title,
    sentence: fieldSentence(message),
  }))
  if (failure !== null && summary.length === 0) summary.push({ sentence: sentence(failure) })
  const proofField = {
    id: 'leave-proof',
    error: errorOf('proof'),
    value: proof,
    onChange: (event: { target: { value: string } }) => setProof(event.target.value),
  }
  return (
    <form noValidate onSubmit={(event) => void submit(event)}>
      <p className="narrow mb-6">{t('leave.text')}</p>
      <div className="mb-6">
        <ErrorSummary errors={summary} attempt={attempt} />
      </div>
      <FormSection title={t('leave.guides')}>
        {leaving.guides.length === 0 && <p>{t('leave.noGuides')}</p>}
        {leaving.guides.map((guide) => (
          <GuideQuestion
            key={guide.guideId}
            guide={guide}
            value={chosen[guide.guideId] ?? ''}
            error={errorOf('guides', guide.guideId)}
            onChoose={(value) => setChosen({ ...chosen, [guide.guideId]: value })}
          />
        ))}
      </FormSection>
      <FormSection title={t('account.leave')}>
        {leaving.revisions > 0 && (
          <RadioGroup
            label={t('leave.name', { count: leaving.revisions })}
            value={name}
            onChange={(event) => setName(event.target.value === 'keep' ? 'keep' : 'former member')}
            options={[
              { value: 'keep', label: t('leave.keep') },
              { value: 'former member', label: t('leave.forget') },
            ]}
          />
        )}
        {account.hasPassword ? (
          <PasswordField {...proofField} label={t('leave.proof')} autoComplete="current-password" />
        ) : (
          <TextField {...proofField} label={t('leave.proofEmail', { email: account.email })} dir="ltr" />
        )}
        <div className="actions">
          <Button kind="go" type="submit" busy={busy}>
            {t('leave.submit')}
          </Button>
          <Link className="button" to="/account">
            {t('leave.cancel')}
          </Link>
        </div>
      </FormSection>
    </form>
  )
}

function GuideQuestion(props: {
  guide: LeavingGuide
  value: string
  error: string | undefined
  onChoose: (value: string) => void
}) {
  const { t, i18n } = useTranslation('accounts')
  const { guide } = props
  if (guide.owners.length > 0) {
    const names = new Intl.ListFormat(localeOf(i18n.language)).format(guide.owners)
    return (
      <p>
        <b>{guide.title}</b> {t('leave.staysWith', { names })}
      </p>
    )
  }
  return (
    <RadioGroup
      id={`leave-${guide.guideId}`}
      label={t('leave.who', { title: guide.title })}
      value={props.value}
      error={props.error}
      onChange={(event) => props.onChoose(event.target.value)}
      options={[
        ...guide.heirs.map(({ userId, name }) => ({ value: userId, label: t('leave.heir', { name }) })),
        { value: 'former member', label: t('leave.former') },
        ...(guide.published ? [] : [{ value: 'removed', label: t('leave.removed') }]),
      ]}
    />
  )
}
