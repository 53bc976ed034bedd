import { fileAddress, type FileEntry } from '../../../shared/api/files'
import type { Callout, Figure } from '../../../shared/guide/schema'
import type { Id } from '../../../shared/lib/ids/id'
import { Balloon } from './Balloon'
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
  return (
    <figure className="figure" id={figure.id}>
      <div className="plate" dir="ltr">
        {file === undefined ? null : <Picture file={file} figure={figure} eager={eager} />}
        <CalloutMarks callouts={figure.callouts} />
      </div>
      <figcaption>
        <b>{t('figure', { number: numbers.figure[figure.id] ?? '' })}</b>{' '}
        <span {...own}>{figure.caption}</span>
      </figcaption>
    </figure>
  )
}

function Picture({ file, figure, eager }: { file: FileEntry; figure: Figure; eager: boolean }) {
  const still = file.renditions.find(({ name }) => name === 'still')
  const loading = eager ? undefined : 'lazy'
  const size = file.picture ?? { width: still?.width ?? 1200, height: still?.height ?? 900 }
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

const percent = (place: number): string => `${place / 100}%`

/** The marks over a picture that have been placed. Their size stays, however small the picture gets. */
export function CalloutMarks({ callouts }: { callouts: readonly Callout[] }) {
  const placed = callouts.flatMap((callout) => (callout.at === null ? [] : [{ ...callout, at: callout.at }]))
  if (placed.length === 0) return null
  return (
    <>
      <svg className="leaders" viewBox="0 0 10000 10000" preserveAspectRatio="none" aria-hidden="true">
        {placed.map(({ id, at, tip, shape }) =>
          tip === null ? null : shape === 'area' ? (
            <rect
              key={id}
              className="l0"
              x={Math.min(at.x, tip.x)}
              y={Math.min(at.y, tip.y)}
              width={Math.abs(at.x - tip.x)}
              height={Math.abs(at.y - tip.y)}
            />
          ) : (
            <path key={id} className="l0" d={`M${at.x} ${at.y}L${tip.x} ${tip.y}`} />
          ),
        )}
      </svg>
      {placed.map((callout) => (
        <CalloutMark key={callout.id} callout={callout} />
      ))}
    </>
  )
}

function CalloutMark({ callout }: { callout: Callout & { at: { x: number; y: number } } }) {
  const own = useOwnLanguage()
  const { at, tip, shape } = callout
  return (
    <>
      {tip !== null && shape !== 'area' && (
        <span className="tip" style={{ left: percent(tip.x), top: percent(tip.y) }} />
      )}
      <span className="mark" style={{ left: percent(at.x), top: percent(at.y) }}>
        {shape === 'balloon' && <Balloon line={callout.line} />}
        {shape === 'dimension' && (
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
    </>
  )
}
