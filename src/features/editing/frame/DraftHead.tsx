import { useEffect } from 'react'
import { useTranslation } from 'react-i18next'
import { Link } from 'react-router-dom'
import { Redo2, Undo2 } from 'lucide-react'
import { Button } from '../../../components/controls/Button'
import { useDraft } from '../draftStore'
import { guideAddress, previewAddress, publishAddress } from './addresses'
import { SaveLine } from './SaveLine'
import { useOpenDraft } from './sessionContext'

/** What was said last, and whether a button for undo goes with it. */
export interface Said {
  words: string
  undo: boolean
}

const SHOWN_FOR_MS = 8000

/** The line over a draft: title, how it stands with saving, undo and redo, the way to the reader's view and to publishing. */
export function DraftHead({ said, onSaid }: { said: Said | null; onSaid: (said: Said | null) => void }) {
  const { t } = useTranslation('editing')
  const { document, readOnly, announce } = useDraft()
  const { guideId, session, view, findings } = useOpenDraft()
  const musts = findings.filter((finding) => finding.must).length
  useEffect(() => {
    if (said === null) return
    const timer = setTimeout(() => onSaid(null), SHOWN_FOR_MS)
    return () => clearTimeout(timer)
  }, [said, onSaid])
  const undo = (): void => {
    if (session.undo()) announce(t('undo.undone'))
  }
  const redo = (): void => {
    if (session.redo()) announce(t('undo.redone'))
  }
  return (
    <div className="sheet draft-head-sheet">
      <div className="draft-head">
        <div className="draft-head-words">
          <Link className="draft-title" to={guideAddress(guideId)} dir="auto">
            {document.title === '' ? t('frame.untitled') : document.title}
          </Link>
          <SaveLine />
        </div>
        <div className="draft-acts">
          {!readOnly && (
            <div className="draft-undo">
              <Button
                onClick={undo}
                disabled={!view.canUndo}
                aria-label={t('undo.undo')}
                title={t('undo.undo')}
              >
                <Undo2 size={18} aria-hidden />
              </Button>
              <Button
                onClick={redo}
                disabled={!view.canRedo}
                aria-label={t('undo.redo')}
                title={t('undo.redo')}
              >
                <Redo2 size={18} aria-hidden />
              </Button>
            </div>
          )}
          <Link className="button" to={previewAddress(guideId)}>
            {t('frame.readAsMaker')}
          </Link>
          {!readOnly && (
            <Link
              className={musts > 0 ? 'button not-ready' : 'button go'}
              to={publishAddress(guideId)}
              aria-describedby={musts > 0 ? 'not-ready-because' : undefined}
            >
              {t('frame.publish')}
            </Link>
          )}
          {!readOnly && musts > 0 && (
            <span className="note oxide" id="not-ready-because">
              {t('findings.must', { count: musts })}
            </span>
          )}
        </div>
      </div>
      <p className="said note" role="status">
        {said !== null && (
          <>
            {said.words}{' '}
            {said.undo && (
              <Button kind="quiet" onClick={undo}>
                {t('undo.undo')}
              </Button>
            )}
          </>
        )}
      </p>
    </div>
  )
}
