import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { Link } from 'react-router-dom'
import { useQuery, useQueryClient } from '@tanstack/react-query'
import { ChangeClass, PublishRevision, type RevisionEntry } from '../../../../shared/api/revisions'
import { Busy } from '../../../components/controls/Busy'
import { Button } from '../../../components/controls/Button'
import { ErrorSummary } from '../../../components/controls/ErrorSummary'
import { RadioGroup } from '../../../components/controls/RadioGroup'
import { Status } from '../../../components/controls/Status'
import { TextArea } from '../../../components/controls/TextArea'
import { TextField } from '../../../components/controls/TextField'
import { useRequestForm } from '../../../lib/useRequestForm'
import { useSentence } from '../../../lib/useSentence'
import { fetchRevisions } from '../api/fetchRevisions'
import { publishRevision } from '../api/publishRevision'
import { useDraft } from '../draftStore'
import { FindingList } from '../findings/FindingList'
import { guideAddress, placeQuery } from '../frame/addresses'
import { useOpenDraft } from '../frame/sessionContext'
import { usePageTitle } from '../frame/usePageTitle'
import { suggestLabel } from './suggestLabel'

/** From draft to revision: what is still open, what it is called, and what changed. */
export function PublishPage() {
  const { t } = useTranslation('editing')
  const sentence = useSentence()
  const { document } = useDraft()
  const { guideId } = useOpenDraft()
  const [published, setPublished] = useState<RevisionEntry | null>(null)
  const revisions = useQuery({ queryKey: ['revisions', guideId], queryFn: () => fetchRevisions(guideId) })
  usePageTitle(`${t('publish.title')} · ${document.title}`)
  if (published !== null) return <Published revision={published} onAgain={() => setPublished(null)} />
  return (
    <div className="publish-page">
      <div className="publish-form">
        <h1 className="t4">{t('publish.title')}</h1>
        <p className="mt-2">{t('publish.hint')}</p>
        {revisions.isPending && <Busy />}
        {revisions.isError && <Status kind="trouble">{sentence(revisions.error)}</Status>}
        {revisions.isSuccess && (
          <PublishForm
            key={revisions.data.revisions[0]?.id ?? 'first'}
            last={revisions.data.revisions[0] ?? null}
            onPublished={setPublished}
          />
        )}
      </div>
      <section className="readiness" aria-label={t('findings.name')}>
        <p className="label">{t('findings.name')}</p>
        <FindingList />
      </section>
    </div>
  )
}

interface PublishFormProps {
  last: RevisionEntry | null
  onPublished: (revision: RevisionEntry) => void
}

function PublishForm({ last, onPublished }: PublishFormProps) {
  const { t } = useTranslation('editing')
  const { document, readOnly } = useDraft()
  const { guideId, session, findings, view } = useOpenDraft()
  const queries = useQueryClient()
  const [classless, setClassless] = useState(false)
  const form = useRequestForm({
    schema: PublishRevision,
    values: { label: suggestLabel(last?.label ?? null), note: '', changeClass: null },
    labels: { label: t('publish.label'), note: t('publish.note'), changeClass: t('publish.changeClass') },
    send: async (ask) => {
      if (last !== null && ask.changeClass === null) {
        setClassless(true)
        return
      }
      setClassless(false)
      const version = await session.settled()
      const revision = await publishRevision(guideId, version, ask)
      await queries.invalidateQueries({ queryKey: ['revisions', guideId] })
      await queries.invalidateQueries({ queryKey: ['guides'] })
      await session.lookAtSite()
      onPublished(revision)
    },
  })
  const musts = findings.filter((finding) => finding.must).length
  const mayPublish = view.guide.roles.includes('owner')
  const blocked =
    readOnly || !mayPublish ? t('publish.onlyOwner') : musts > 0 ? t('findings.must', { count: musts }) : ''
  const label = form.form.watch('label')
  return (
    <form className="stack mt-6" onSubmit={form.submit} noValidate data-own-undo>
      <ErrorSummary {...form.summary} />
      <dl className="draft-facts">
        <dt>{t('front.licence')}</dt>
        <dd>
          {document.licence === '' ? (
            <span className="oxide">{t('publish.noLicence')}</span>
          ) : (
            <code className="mono">{document.licence}</code>
          )}{' '}
          <Link to={guideAddress(guideId) + placeQuery(null, 'licence')}>{t('publish.change')}</Link>
        </dd>
        <dt>{t('publish.last')}</dt>
        <dd>
          {last === null ? (
            t('publish.first')
          ) : (
            <a href={last.address}>{t('publish.revision', { label: last.label })}</a>
          )}
        </dd>
      </dl>
      <TextField {...form.field('label')} maxLength={20} description={t('publish.labelHint')} dir="auto" />
      <TextArea {...form.field('note')} rows={4} description={t('publish.noteHint')} dir="auto" />
      {last !== null && (
        <RadioGroup
          {...form.field('changeClass')}
          error={classless ? t('publish.chooseClass') : form.field('changeClass').error}
          options={ChangeClass.options.map((value) => ({
            value,
            label: t(`changeClass.${value}.name`),
            description: t(`changeClass.${value}.meaning`),
          }))}
        />
      )}
      <div className="actions">
        <Button kind="go" type="submit" busy={form.busy} blockedBecause={blocked}>
          {label.trim() === '' ? t('publish.publish') : t('publish.publishLabel', { label })}
        </Button>
      </div>
    </form>
  )
}

function Published({ revision, onAgain }: { revision: RevisionEntry; onAgain: () => void }) {
  const { t } = useTranslation('editing')
  const { guideId, view } = useOpenDraft()
  return (
    <div className="publish-page">
      <div className="publish-form stack" role="status">
        <h1 className="t4">{t('publish.done', { label: revision.label })}</h1>
        <p>{t('publish.doneHint')}</p>
        <dl className="draft-facts">
          <dt>{t('publish.latestAddress')}</dt>
          <dd>
            <a href={`/guides/${view.guide.slug}`}>/guides/{view.guide.slug}</a>
          </dd>
          <dt>{t('publish.itsAddress')}</dt>
          <dd>
            <a href={revision.address}>{revision.address}</a>
          </dd>
        </dl>
        <div className="actions">
          <a className="button go" href={`/guides/${view.guide.slug}`}>
            {t('publish.read')}
          </a>
          <Link className="button" to={guideAddress(guideId)} onClick={onAgain}>
            {t('publish.goOn')}
          </Link>
        </div>
      </div>
    </div>
  )
}
