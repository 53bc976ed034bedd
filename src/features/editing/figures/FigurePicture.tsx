import { useTranslation } from 'react-i18next'
import { fileAddress, type FileEntry } from '../../../../shared/api/files'
import type { Figure } from '../../../../shared/guide/schema'
import { Busy } from '../../../components/controls/Busy'
import { useDraft } from '../draftStore'

/** The file behind a figure, and the address of what can be shown of it already. */
export function usePicture(figure: Figure): {
  file: FileEntry | undefined
  address: string | null
  /** A drawing of lines, not a photo. */
  drawn: boolean
  ratio: number
} {
  const { files } = useDraft()
  const file = figure.asset === null ? undefined : files.get(figure.asset)
  const shown =
    file?.renditions.find(({ name }) => name === 'still') ??
    file?.renditions.find(({ name }) => name === 'webp-960') ??
    file?.renditions.find(({ mediaType }) => mediaType.startsWith('image/'))
  const size = file?.picture ?? shown
  const ratio = size?.width && size.height ? size.width / size.height : 4 / 3
  return {
    file,
    ratio,
    drawn: shown?.name === 'still',
    address: file === undefined || shown === undefined ? null : fileAddress(file.sha256, shown.name),
  }
}

/** The picture, or how far it is on its way, or why it is not there. */
export function FigurePicture({ figure }: { figure: Figure }) {
  const { t } = useTranslation('editingFigures')
  const { file, address, ratio, drawn } = usePicture(figure)
  if (address !== null) {
    return (
      <img
        className={drawn ? 'drawing' : undefined}
        src={address}
        alt={figure.alt}
        width={1000}
        height={Math.round(1000 / ratio)}
        draggable={false}
      />
    )
  }
  return (
    <div className="no-picture" style={{ aspectRatio: ratio }}>
      {file?.state === 'working' && <Busy>{t('picture.working')}</Busy>}
      {file?.state === 'failed' && <p className="field-error">{file.trouble ?? t('picture.failed')}</p>}
      {file === undefined && (
        <p className="note">{t(figure.asset === null ? 'picture.none' : 'picture.unknown')}</p>
      )}
    </div>
  )
}
