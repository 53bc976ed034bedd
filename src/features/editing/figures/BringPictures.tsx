import { useRef, type ChangeEvent } from 'react'
import { useTranslation } from 'react-i18next'
import { Camera, ImagePlus } from 'lucide-react'
import { Button } from '../../../components/controls/Button'

export interface BringPicturesProps {
  onBring: (files: readonly File[]) => void
  busy: boolean
  /** Files are held over the page. */
  over: boolean
  none: boolean
  front: boolean
}

/** The place where pictures come in. */
export function BringPictures({ onBring, busy, over, none, front }: BringPicturesProps) {
  const { t } = useTranslation('editingFigures')
  const chooser = useRef<HTMLInputElement>(null)
  const camera = useRef<HTMLInputElement>(null)
  const take = (event: ChangeEvent<HTMLInputElement>): void => {
    const files = [...(event.target.files ?? [])]
    // The same file may be chosen again.
    event.target.value = ''
    onBring(files)
  }
  const accept = front ? 'image/*' : 'image/*,.stl,model/stl'
  return (
    <div className="bring-pictures" data-over={over || undefined} data-field="add-figure">
      {over ? (
        <p className="note">{t('bring.drop')}</p>
      ) : (
        (none || front) && (
          <p className="note">{t(front ? (none ? 'bring.frontHint' : 'bring.frontOther') : 'bring.hint')}</p>
        )
      )}
      <div className="actions">
        <input ref={chooser} type="file" hidden multiple={!front} accept={accept} onChange={take} />
        <input ref={camera} type="file" hidden accept="image/*" capture="environment" onChange={take} />
        <Button busy={busy} onClick={() => chooser.current?.click()}>
          <ImagePlus size={18} aria-hidden />
          {t(front && !none ? 'bring.chooseOther' : 'bring.choose')}
        </Button>
        <Button className="take-photo" busy={busy} onClick={() => camera.current?.click()}>
          <Camera size={18} aria-hidden />
          {t('bring.camera')}
        </Button>
      </div>
    </div>
  )
}
