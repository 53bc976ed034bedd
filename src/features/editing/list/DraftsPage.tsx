import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { Link, useSearchParams } from 'react-router-dom'
import { useInfiniteQuery } from '@tanstack/react-query'
import type { GuideEntry } from '../../../../shared/api/guides'
import { Busy } from '../../../components/controls/Busy'
import { Button } from '../../../components/controls/Button'
import { EmptyState } from '../../../components/controls/EmptyState'
import { Status } from '../../../components/controls/Status'
import { RequestProblem } from '../../../lib/request'
import { useSentence } from '../../../lib/useSentence'
import { fetchGuides } from '../api/fetchGuides'
import '../editing.css'
import { draftAddress } from '../frame/addresses'
import { usePageTitle } from '../frame/usePageTitle'
import { StartGuideDialog } from './StartGuideDialog'
import { localeOf } from '../../../lib/localeOf'

/** The guides that a person works on, the last changed first. */
export function DraftsPage() {
  const { t } = useTranslation('editing')
  const sentence = useSentence()
  const [query] = useSearchParams()
  const [starting, setStarting] = useState(query.has('start'))
  const pages = useInfiniteQuery({
    queryKey: ['guides'],
    queryFn: ({ pageParam }) => fetchGuides(pageParam),
    initialPageParam: null as string | null,
    getNextPageParam: (page) => page.next,
  })
  usePageTitle(t('list.title'))
  const guides = pages.data?.pages.flatMap((page) => page.guides) ?? []
  const signedOut = pages.error instanceof RequestProblem && pages.error.kind === 'not-signed-in'
  const acts = (
    <>
      <Button kind="go" onClick={() => setStarting(true)}>
        {t('list.start')}
      </Button>
      <Link className="button" to="/bring">
        {t('list.bring')}
      </Link>
    </>
  )
  return (
    <div className="sheet drafts-page">
      <div className="drafts-head">
        <h1 className="t4">{t('list.title')}</h1>
        {guides.length > 0 && <div className="actions">{acts}</div>}
      </div>
      {pages.isPending && <Busy />}
      {pages.isError && (
        <div className="stack mt-6">
          <Status kind="trouble">{sentence(pages.error)}</Status>
          <p className="actions">
            {signedOut ? (
              <a className="button go" href="/sign-in?next=/drafts">
                {t('save.signIn')}
              </a>
            ) : (
              <Button onClick={() => void pages.refetch()}>{t('frame.tryAgain')}</Button>
            )}
          </p>
        </div>
      )}
      {pages.isSuccess && guides.length === 0 && <EmptyState action={acts}>{t('list.empty')}</EmptyState>}
      {guides.length > 0 && <Guides guides={guides} />}
      {pages.hasNextPage && (
        <p className="mt-5">
          <Button busy={pages.isFetchingNextPage} onClick={() => void pages.fetchNextPage()}>
            {t('list.more')}
          </Button>
        </p>
      )}
      <StartGuideDialog open={starting} onClose={() => setStarting(false)} />
    </div>
  )
}

function Guides({ guides }: { guides: readonly GuideEntry[] }) {
  const { t, i18n } = useTranslation('editing')
  const when = new Intl.DateTimeFormat(localeOf(i18n.language), { dateStyle: 'medium', timeStyle: 'short' })
  const day = new Intl.DateTimeFormat(localeOf(i18n.language), { dateStyle: 'medium' })
  const roles = (entry: GuideEntry): string =>
    new Intl.ListFormat(localeOf(i18n.language)).format(entry.roles.map((role) => t(`role.${role}`)))
  return (
    <table className="ledger fold drafts-ledger">
      <thead>
        <tr>
          <th>{t('list.guide')}</th>
          <th>{t('list.role')}</th>
          <th>{t('list.saved')}</th>
          <th>{t('list.published')}</th>
        </tr>
      </thead>
      <tbody>
        {guides.map((guide) => (
          <tr key={guide.id}>
            <td>
              <Link className="name" to={draftAddress(guide.id)} dir="auto">
                {guide.title === '' ? t('frame.untitled') : guide.title}
              </Link>
              {guide.byline !== '' && <small dir="auto">{guide.byline}</small>}
            </td>
            <td>{roles(guide)}</td>
            <td>
              {when.format(new Date(guide.updatedAt))}
              {guide.updatedByName !== null && <small>{t('list.by', { name: guide.updatedByName })}</small>}
            </td>
            <td>
              {guide.latest === null ? (
                <span className="graphite">{t('list.notPublished')}</span>
              ) : (
                <>
                  <a href={`/guides/${guide.slug}`}>{t('publish.revision', { label: guide.latest.label })}</a>
                  <small>{day.format(new Date(guide.latest.publishedAt))}</small>
                </>
              )}
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  )
}
