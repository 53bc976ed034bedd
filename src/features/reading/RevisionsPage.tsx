import type { GuideData } from '../../../shared/api/pages'
import { useOwnLanguage, useWords } from '../../components/reading/useWords'
import { GuideFrame } from './GuideFrame'

export function RevisionsPage({ guide }: { guide: GuideData }) {
  const { t } = useWords()
  return (
    <GuideFrame guide={guide} place="revisions">
      <h1 className="t4 page-title">{t('place.revisions')}</h1>
      <p className="note">{t('neverChanges')}</p>
      <RevisionTable guide={guide} />
    </GuideFrame>
  )
}

export function RevisionTable({ guide }: { guide: GuideData }) {
  const { t, date } = useWords()
  const own = useOwnLanguage()
  return (
    <table className="ledger revisions">
      <thead>
        <tr>
          <th scope="col">{t('revisionWord')}</th>
          <th scope="col">{t('published')}</th>
          <th scope="col">{t('whatChanged')}</th>
          <th scope="col">{t('changeClass')}</th>
        </tr>
      </thead>
      <tbody>
        {guide.revisions.map((revision) => (
          <tr key={revision.id}>
            <td>
              <a
                className="name"
                href={revision.address}
                aria-current={revision.id === guide.revision.id ? 'true' : undefined}
              >
                {revision.label}
              </a>
            </td>
            <td className="nowrap">
              <time dateTime={revision.publishedAt}>{date(revision.publishedAt)}</time>
            </td>
            <td {...own}>{revision.note}</td>
            <td className={revision.changeClass === 'not interchangeable' ? 'oxide' : undefined}>
              {revision.changeClass === null ? '' : t(`class.${revision.changeClass}`)}
            </td>
          </tr>
        ))}
      </tbody>
    </table>
  )
}
