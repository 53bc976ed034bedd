import { useMutation, useQuery, useQueryClient } from '@tanstack/react-query'
import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { Link, useNavigate, useParams } from 'react-router-dom'
import type { ImportEntry, Understanding } from '../../../../shared/api/imports'
import { Busy } from '../../../components/controls/Busy'
import { Button } from '../../../components/controls/Button'
import { Status } from '../../../components/controls/Status'
import { useSentence } from '../../../lib/useSentence'
import { changeImport, importQuery, leaveImport, takeImport } from '../api/imports'
import { counts, type Change } from '../changeUnderstanding'
import { useTitle } from '../useTitle'
import { FrontFields } from './FrontFields'
import { LinesLedger } from './LinesLedger'
import { ModelList } from './ModelList'
import { StepOutline } from './StepOutline'
import { TableMapping } from './TableMapping'
import { UnusedList } from './UnusedList'

/** What was understood of the files, before anything is created: all of it can be corrected, left out, or given up. */
export function UnderstoodPage() {
  const { t } = useTranslation('importing')
  const { importId = '' } = useParams()
  const { data, error } = useQuery(importQuery(importId))
  const sentence = useSentence()
  useTitle(t('understood'))
  if (error !== null) return <Trouble text={sentence(error)} />
  if (data === undefined) return <Busy />
  if (data.state === 'failed') return <Trouble text={data.trouble ?? t('failed')} />
  if (data.state === 'reading') return <Reading entry={data} />
  if (data.state === 'taken') return <Taken guideId={data.guideId} />
  if (data.understanding === null) return <Trouble text={t('failed')} />
  return <LookOver key={importId} entry={data} first={data.understanding} />
}

function Trouble({ text }: { text: string }) {
  const { t } = useTranslation('importing')
  return (
    <div className="sheet narrow-page stack">
      <h1 className="t4 page-title">{t('notRead')}</h1>
      <Status kind="trouble">{text}</Status>
      <p>
        <Link className="button" to="/bring">
          {t('bringOther')}
        </Link>
      </p>
    </div>
  )
}

function Reading({ entry }: { entry: ImportEntry }) {
  const { t } = useTranslation('importing')
  const { done, total, now } = entry.progress
  return (
    <div className="sheet narrow-page stack" aria-busy="true">
      <h1 className="t4 page-title">{t('reading')}</h1>
      <progress value={total === 0 ? undefined : done} max={Math.max(total, 1)} aria-label={t('reading')} />
      <p className="note" role="status">
        {t('readingNow', { done, total })} {now}
      </p>
    </div>
  )
}

function Taken({ guideId }: { guideId: string | null }) {
  const { t } = useTranslation('importing')
  return (
    <div className="sheet narrow-page stack">
      <h1 className="t4 page-title">{t('taken')}</h1>
      <p>
        <Link className="button go" to={guideId === null ? '/drafts' : `/drafts/${guideId}`}>
          {t('goToDraft')}
        </Link>
      </p>
    </div>
  )
}

function LookOver({ entry, first }: { entry: ImportEntry; first: Understanding }) {
  const { t } = useTranslation('importing')
  const sentence = useSentence()
  const navigate = useNavigate()
  const queries = useQueryClient()
  const [understanding, setUnderstanding] = useState(first)
  const edit = (change: Change): void => setUnderstanding(change)
  const reread = useMutation({
    mutationFn: (changed: Understanding) => changeImport(entry.id, changed),
    onSuccess: (answer) => {
      queries.setQueryData(importQuery(entry.id).queryKey, answer)
      if (answer.understanding !== null) setUnderstanding(answer.understanding)
    },
  })
  const take = useMutation({
    mutationFn: async () => {
      await changeImport(entry.id, understanding)
      return takeImport(entry.id)
    },
    onSuccess: async ({ guideId }) => {
      queries.removeQueries({ queryKey: importQuery(entry.id).queryKey })
      await navigate(`/drafts/${guideId}`)
    },
  })
  const leave = useMutation({ mutationFn: () => leaveImport(entry.id), onSuccess: () => navigate('/drafts') })
  const found = counts(understanding)
  const trouble = take.error ?? reread.error ?? leave.error
  return (
    <div className="sheet understood">
      <div className="understood-head">
        <div>
          <h1 className="t4 page-title">{t('understood')}</h1>
          <p>{t(entry.guideId === null ? 'nothingMadeYet' : 'nothingAddedYet')}</p>
        </div>
        <div className="actions">
          <Button busy={leave.isPending} onClick={() => leave.mutate()}>
            {t('leave')}
          </Button>
          <Button kind="go" busy={take.isPending} onClick={() => take.mutate()}>
            {t(entry.guideId === null ? 'makeDraft' : 'addToDraft')}
          </Button>
        </div>
      </div>
      <Status kind="trouble">{trouble === null ? null : sentence(trouble)}</Status>
      <p className="understood-sum num" role="status">
        {t('sum.steps', { count: found.steps })}, {t('sum.figures', { count: found.figures })}
        {found.noPicture > 0 && (
          <span className="ochre">, {t('sum.noPicture', { count: found.noPicture })}</span>
        )}
        , {t('sum.lines', { count: found.lines })}
        {found.noQuantity > 0 && (
          <span className="ochre">, {t('sum.noQuantity', { count: found.noQuantity })}</span>
        )}
        , {t('sum.models', { count: found.models })}
      </p>
      {entry.guideId === null && <FrontFields understanding={understanding} edit={edit} />}
      <StepOutline understanding={understanding} edit={edit} />
      <LinesLedger understanding={understanding} edit={edit} />
      {understanding.tables.map((table) => (
        <TableMapping
          key={table.key}
          table={table}
          busy={reread.isPending}
          change={(next) =>
            reread.mutate({
              ...understanding,
              tables: understanding.tables.map((other) => (other.key === table.key ? next : other)),
            })
          }
        />
      ))}
      <ModelList understanding={understanding} edit={edit} />
      <UnusedList understanding={understanding} />
    </div>
  )
}
