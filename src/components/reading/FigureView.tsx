import { fileAddress, type FileEntry } from '../../../shared/api/files'
import type { Callout, Figure } from '../../../shared/guide/schema'
import type { Id } from '../../../shared/lib/ids/id'
import { Balloon } from './Balloon'
import { CalloutLines } from './CalloutLines'
import { placedOf, placeStyle, wordsPlace, type Placed } from './calloutShape'
import { useGuide } from './guideView'
import { QuantityView } from './QuantityView'
import { useOwnLanguage, useWords } from './useWords'

/** A numbered picture with its caption; callouts are text and lines over it, so that they scale and can be translated. */
export function FigureView({ id, eager = false }: { id: Id; eager?: boolean }) {
  const { t } = useWords()
  const own = useOwnLanguage()
  const { doc, numbers, files } = useGuide()
  const figure = doc.figures.find((candidate) => candidate.id === id)
  const file = figure?.asset === undefined || figure.asset === null ? undefined : files.get(figure.asset)
  if (figure === undefined) return null
  const size = sizeOf(file)
  return (
    <figure className="figure" id={figure.id}>
      <div className="plate" dir="ltr">
        {file === undefined ? null : <Picture file={file} figure={figure} eager={eager} size={size} />}
        <CalloutMarks callouts={figure.callouts} ratio={size.width / size.height} />
      </div>
      <figcaption>
        <b>{t('figure', { number: numbers.figure[figure.id] ?? '' })}</b>{' '}
        <span {...own}>{figure.caption}</span>
      </figcaption>
    </figure>
  )
}

interface Size {
  width: number
  height: number
}

/** A picture's size as it is seen; a usual one where it is not known. */
function sizeOf(file: FileEntry | undefined): Size {
  const still = file?.renditions.find(({ name }) => name === 'still')
  return file?.picture ?? { width: still?.width ?? 1200, height: still?.height ?? 900 }
}

interface PictureProps {
  file: FileEntry
  figure: Figure
  eager: boolean
  size: Size
}

function Picture({ file, figure, eager, size }: PictureProps) {
  const still = file.renditions.find(({ name }) => name === 'still')
  const loading = eager ? undefined : 'lazy'
  const shape = { width: size.width, height: size.height, alt: figure.alt, loading } as const
  if (still !== undefined)
    return <img className="drawing" src={fileAddress(file.sha256, still.name)} {...shape} />
  const sizes = '(min-width: 704px) 544px, 100vw'
  const set = (kind: string): string =>
    file.renditions
      .filter(({ name }) => name.startsWith(`${kind}-`))
      .map((made) => `${fileAddress(file.sha256, made.name)} ${made.width ?? size.width}w`)
      .join(', ')
  const webp = file.renditions.filter(({ name }) => name.startsWith('webp-'))
  const plain = webp.find(({ name }) => name === 'webp-960') ?? webp.at(-1)
  if (plain === undefined) return null
  return (
    <picture>
      {set('avif') !== '' && <source type="image/avif" srcSet={set('avif')} sizes={sizes} />}
      <img src={fileAddress(file.sha256, plain.name)} srcSet={set('webp')} sizes={sizes} {...shape} />
    </picture>
  )
}

/** The marks over a picture that have been placed. Their size stays, however small the picture gets. */
function CalloutMarks({ callouts, ratio }: { callouts: readonly Callout[]; ratio: number }) {
  const placed = placedOf(callouts)
  if (placed.length === 0) return null
  return (
    <>
      <CalloutLines callouts={placed} ratio={ratio} />
      {placed.map((callout) => (
        <CalloutMark key={callout.id} callout={callout} />
      ))}
    </>
  )
}

function CalloutMark({ callout }: { callout: Placed }) {
  const own = useOwnLanguage()
  return (
    <span className="mark" style={placeStyle(wordsPlace(callout))}>
      {callout.shape === 'balloon' && <Balloon line={callout.line} />}
      {callout.shape === 'dimension' && (
        <span className="dt">
          <QuantityView {...callout.value} />
        </span>
      )}
      {callout.text !== undefined && callout.text !== '' && (
        <span className="dt" {...own}>
          {callout.text}
        </span>
      )}
    </span>
  )
}
