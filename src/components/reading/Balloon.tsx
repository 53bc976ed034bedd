import type { Id } from '../../../shared/lib/ids/id'
import { useGuide } from './guideView'

/** The circled number of a line; the second ring of a substitute. A line that is not there has no balloon. */
export function Balloon({
  line,
  plain = false,
  named = true,
}: {
  line: Id
  /** Not a link: where the line itself stands. */
  plain?: boolean
  /** False where the part's name stands beside it, which is not read out twice. */
  named?: boolean
}) {
  const { doc, whole, numbers, base } = useGuide()
  const found = doc.lines.find((candidate) => candidate.id === line)
  const number = numbers.line[line]
  if (found === undefined || number === undefined) return null
  const option = found.options[0]!
  const designers = whole.lines.find((candidate) => candidate.id === line)?.options[0]?.id
  const shape = option.id === designers ? 'balloon' : 'balloon substitute'
  if (plain) return <span className={shape}>{number}</span>
  return (
    <a className={shape} href={`${base}/parts#${line}`} title={named ? option.part.name : undefined}>
      {named && <span className="visually-hidden">{option.part.name} </span>}
      {number}
    </a>
  )
}
