import { useCallback, useDeferredValue, useEffect, useMemo, useState, type ReactNode } from 'react'
import { useTranslation } from 'react-i18next'
import { Link } from 'react-router-dom'
import { numbering } from '../../../../shared/guide/numbering'
import type { Choices } from '../../../../shared/guide/holds'
import type { Id } from '../../../../shared/lib/ids/id'
import { Busy } from '../../../components/controls/Busy'
import { Button } from '../../../components/controls/Button'
import { RequestProblem } from '../../../lib/request'
import { useSentence } from '../../../lib/useSentence'
import { DraftContext, type DraftAtHand } from '../draftStore'
import { judge } from '../findings/judge'
import { ReadinessPanel } from '../findings/ReadinessPanel'
import { Outline } from '../outline/Outline'
import type { DraftSession, DraftView } from '../state/draftSession'
import { newId } from '../state/newId'
import { useDraftState } from '../state/useDraftState'
import '../editing.css'
import { ConflictNotices } from './ConflictNotices'
import { DraftHead, type Said } from './DraftHead'
import { FileNotices } from './FileNotices'
import { OpenDraftContext, type OpenDraft } from './sessionContext'
import { useGoToPlace } from './useGoToPlace'
import { usePageTitle } from './usePageTitle'
import { useUndoKeys } from './useUndoKeys'

/** A designer reads and writes the guide as designed: the first option of each line. */
const AS_DESIGNED: Choices = {}

export interface DraftFrameProps {
  guideId: string
  /** Who is signed in: what is kept on this device is that person's alone. */
  personId: string
  /** The step that is open; null on the other pages. */
  stepId: Id | null
  /** Without outline and readiness beside it: the preview and the publish page. */
  bare?: boolean
  children: ReactNode
}

/** Opens a draft and puts the head line, the outline and the readiness list round the page that is edited. */
export function DraftFrame({ guideId, personId, ...rest }: DraftFrameProps) {
  const { t } = useTranslation('editing')
  const sentence = useSentence()
  const { session, view } = useDraftState(personId, guideId)
  if (view.is === 'failed') {
    const signIn = view.error instanceof RequestProblem && view.error.kind === 'not-signed-in'
    return (
      <div className="sheet py-12">
        <h1 className="t4">{t('frame.failed')}</h1>
        <p className="mt-4">{sentence(view.error)}</p>
        <p className="actions mt-6">
          {signIn ? (
            <a className="button go" href={`/sign-in?next=${encodeURIComponent(location.pathname)}`}>
              {t('save.signIn')}
            </a>
          ) : (
            <Button onClick={() => location.reload()}>{t('frame.tryAgain')}</Button>
          )}
        </p>
      </div>
    )
  }
  if (view.is === 'loading') {
    return (
      <div className="sheet py-12">
        <Busy>{t('frame.loading')}</Busy>
      </div>
    )
  }
  return <OpenFrame guideId={guideId} session={session} view={view.draft} {...rest} />
}

function OpenFrame({
  guideId,
  session,
  view,
  stepId,
  bare = false,
  children,
}: Omit<DraftFrameProps, 'personId'> & { session: DraftSession; view: DraftView }) {
  const { t } = useTranslation('editing')
  const [said, setSaid] = useState<Said | null>(null)
  const announce = useCallback((words: string) => setSaid({ words, undo: false }), [])
  const sayDone = useCallback((words: string) => setSaid({ words, undo: true }), [])
  const undoSaid = useCallback((what: 'undone' | 'redone') => announce(t(`undo.${what}`)), [announce, t])
  useUndoKeys(session, undoSaid)
  useGoToPlace()
  useEffect(() => session.goTo(stepId), [session, stepId])

  const { document, files } = view
  const readOnly = !view.guide.roles.some((role) => role === 'owner' || role === 'author')
  const draft = useMemo<DraftAtHand>(
    () => ({
      document,
      numbers: numbering(document),
      files,
      choices: AS_DESIGNED,
      edit: (change, together) => {
        if (!readOnly) session.edit(change, together)
      },
      newId,
      bringFiles: (brought) => session.bringFiles(brought),
      announce,
      readOnly,
    }),
    [document, files, session, announce, readOnly],
  )
  // Readiness looks at the whole guide: it follows a moment after what is typed.
  const settledDocument = useDeferredValue(document)
  const settledFiles = useDeferredValue(files)
  const judged = useMemo(() => judge(settledDocument, settledFiles), [settledDocument, settledFiles])
  const open = useMemo<OpenDraft>(
    () => ({ guideId, session, view, sayDone, ...judged }),
    [guideId, session, view, sayDone, judged],
  )
  usePageTitle(document.title === '' ? t('frame.untitled') : document.title)
  return (
    <DraftContext.Provider value={draft}>
      <OpenDraftContext.Provider value={open}>
        <DraftHead said={said} onSaid={setSaid} />
        <div className="sheet">
          <ConflictNotices />
          <FileNotices />
          {readOnly && <p className="note draft-notice">{t('frame.readOnly')}</p>}
          {bare ? (
            children
          ) : (
            <div className="draft-grid">
              <Outline currentStep={stepId} />
              <div className="draft-text">{children}</div>
              <ReadinessPanel stepId={stepId} />
            </div>
          )}
        </div>
      </OpenDraftContext.Provider>
    </DraftContext.Provider>
  )
}

/** A place in the draft that is not there (any more): another author may have removed it. */
export function NoSuchStep({ guideId }: { guideId: string }) {
  const { t } = useTranslation('editing')
  return (
    <div className="stack">
      <h1 className="t4">{t('step.gone')}</h1>
      <p>{t('step.goneHint')}</p>
      <p>
        <Link className="button" to={`/drafts/${guideId}/guide`}>
          {t('place.guide')}
        </Link>
      </p>
    </div>
  )
}
