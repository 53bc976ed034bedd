import { useState } from 'react'
import { useTranslation } from 'react-i18next'
import { Link } from 'react-router-dom'
import type { DraftConflict } from '../../../../shared/api/drafts'
import { Button } from '../../../components/controls/Button'
import { Status } from '../../../components/controls/Status'
import { useSentence } from '../../../lib/useSentence'
import { useDraft } from '../draftStore'
import { stepsOf } from '../../../../shared/guide/stepsOf'
import { stepAddress } from './addresses'
import { asWords } from './asWords'
import { useOpenDraft } from './sessionContext'

/** Places that two people changed at once: both versions, and which of them shall stay. */
export function ConflictNotices() {
  const { t } = useTranslation('editing')
  const { view } = useOpenDraft()
  if (view.conflicts.length === 0) return null
  return (
    <section className="conflicts" aria-label={t('conflict.title', { count: view.conflicts.length })}>
      <h2 className="t1">{t('conflict.title', { count: view.conflicts.length })}</h2>
      <p className="note">{t('conflict.hint')}</p>
      {view.conflicts.map((conflict) => (
        <Conflict key={conflict.id} conflict={conflict} />
      ))}
    </section>
  )
}

function Conflict({ conflict }: { conflict: DraftConflict }) {
  const { t } = useTranslation('editing')
  const sentence = useSentence()
  const { session } = useOpenDraft()
  const { readOnly } = useDraft()
  const [busy, setBusy] = useState<'mine' | 'theirs' | null>(null)
  const [trouble, setTrouble] = useState<string | null>(null)
  const settle = async (keep: 'mine' | 'theirs'): Promise<void> => {
    setBusy(keep)
    setTrouble(null)
    try {
      await session.settle(conflict.id, keep)
    } catch (error) {
      setTrouble(sentence(error))
    } finally {
      setBusy(null)
    }
  }
  const sides = [
    { keep: 'theirs', name: conflict.theirsByName, value: conflict.theirs, note: t('conflict.inDraft') },
    { keep: 'mine', name: conflict.mineByName, value: conflict.mine, note: t('conflict.aside') },
  ] as const
  return (
    <div className="conflict">
      <p className="note">
        <Where node={conflict.node} /> {t(`conflict.why.${conflict.why}`)}
        {conflict.field !== '' && (
          <>
            : <b>{t(`conflict.field.${conflict.field}`, { defaultValue: conflict.field })}</b>
          </>
        )}
      </p>
      <div className="conflict-sides">
        {sides.map(({ keep, name, value, note }) => (
          <div key={keep}>
            <p className="label">
              <bdi>{name}</bdi>, {note}
            </p>
            <p className="conflict-words" dir="auto">
              {asWords(value) || t('conflict.nothing')}
            </p>
            {!readOnly && (
              <Button busy={busy === keep} onClick={() => void settle(keep)}>
                {t(keep === 'mine' ? 'conflict.takeAside' : 'conflict.keepDraft')}
                <span className="visually-hidden"> {name}</span>
              </Button>
            )}
          </div>
        ))}
      </div>
      <Status kind="trouble">{trouble}</Status>
    </div>
  )
}

/** Which step it is in, as a link; the guide itself where it is in none. */
function Where({ node }: { node: string | null }) {
  const { t } = useTranslation('editing')
  const { document, numbers } = useDraft()
  const { guideId } = useOpenDraft()
  const step =
    node === null
      ? undefined
      : stepsOf(document).find((each) => each.id === node || JSON.stringify(each).includes(`"${node}"`))
  if (step === undefined) return <b>{t('conflict.guide')}</b>
  return (
    <Link to={stepAddress(guideId, step.id)}>
      {t('outline.stepName', { number: numbers.step[step.id], title: step.title })}
    </Link>
  )
}
