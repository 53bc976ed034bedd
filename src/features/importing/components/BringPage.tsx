import { useRef, useState, type DragEvent } from 'react'
import { useTranslation } from 'react-i18next'
import { useNavigate, useParams } from 'react-router-dom'
import { Button } from '../../../components/controls/Button'
import { Status } from '../../../components/controls/Status'
import { useSentence } from '../../../lib/useSentence'
import { startImport, type PlacedFile } from '../api/imports'
import { fromChooser, fromDrop, withoutClutter } from '../placedFiles'
import { useTitle } from '../useTitle'

/** Where files are brought in: a new guide, or an existing draft that they add to. */
export function BringPage() {
  const { t } = useTranslation('importing')
  const { guideId } = useParams()
  useTitle(t('title'))
  return (
    <div className="sheet narrow-page stack">
      <h1 className="t4 page-title">{t(guideId === undefined ? 'title' : 'titleInto')}</h1>
      <p>{t(guideId === undefined ? 'lede' : 'ledeInto')}</p>
      <Drop guideId={guideId} />
      <h2 className="label">{t('whatCanBe')}</h2>
      <ul className="ticks">
        {['markdown', 'tables', 'pictures', 'models', 'zip'].map((kind) => (
          <li key={kind}>{t(`kinds.${kind}`)}</li>
        ))}
      </ul>
    </div>
  )
}

function Drop({ guideId }: { guideId: string | undefined }) {
  const { t } = useTranslation('importing')
  const sentence = useSentence()
  const navigate = useNavigate()
  const files = useRef<HTMLInputElement>(null)
  const folder = useRef<HTMLInputElement>(null)
  const giveUp = useRef<AbortController | null>(null)
  const [over, setOver] = useState(false)
  const [sent, setSent] = useState<number | null>(null)
  const [trouble, setTrouble] = useState<string | null>(null)

  async function send(all: PlacedFile[]): Promise<void> {
    const placed = withoutClutter(all)
    if (placed.length === 0) {
      setTrouble(t('nothingThere'))
      return
    }
    giveUp.current = new AbortController()
    setTrouble(null)
    setSent(0)
    try {
      const { id } = await startImport(placed, guideId, setSent, giveUp.current.signal)
      await navigate(`/bring/${id}`)
    } catch (error) {
      setSent(null)
      setTrouble(
        error instanceof DOMException && error.name === 'AbortError' ? t('givenUp') : sentence(error),
      )
    }
  }
  const drop = (event: DragEvent): void => {
    event.preventDefault()
    setOver(false)
    void fromDrop(event.dataTransfer).then(send)
  }
  return (
    <div
      className={over ? 'drop-place over' : 'drop-place'}
      onDragOver={(event) => {
        event.preventDefault()
        setOver(true)
      }}
      onDragLeave={() => setOver(false)}
      onDrop={drop}
    >
      {sent === null ? (
        <>
          <p>{t('dropHere')}</p>
          <p className="actions">
            <Button kind="go" onClick={() => files.current?.click()}>
              {t('chooseFiles')}
            </Button>
            <Button onClick={() => folder.current?.click()}>{t('chooseFolder')}</Button>
          </p>
        </>
      ) : (
        <>
          <p id="sending">{t('sending', { percent: Math.round(sent * 100) })}</p>
          <progress value={sent} max={1} aria-labelledby="sending" />
          <p>
            <Button onClick={() => giveUp.current?.abort()}>{t('giveUp')}</Button>
          </p>
        </>
      )}
      <input
        ref={files}
        hidden
        type="file"
        multiple
        aria-label={t('chooseFiles')}
        onChange={(event) => void send(fromChooser(event.target.files))}
      />
      <input
        ref={(input) => {
          folder.current = input
          // React has no property for choosing whole folders.
          input?.setAttribute('webkitdirectory', '')
        }}
        hidden
        type="file"
        multiple
        aria-label={t('chooseFolder')}
        onChange={(event) => void send(fromChooser(event.target.files))}
      />
      <Status kind="trouble">{trouble}</Status>
    </div>
  )
}
