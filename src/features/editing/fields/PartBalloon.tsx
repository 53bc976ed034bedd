import { useTranslation } from 'react-i18next'
import type { Condition } from '../../../../shared/guide/schema'
import type { Id } from '../../../../shared/lib/ids/id'
import { useDraft } from '../draftStore'
import { isSubstitute } from './isSubstitute'

export interface PartBalloonProps {
  line: Id
  /** The condition under which the place of the balloon is there. */
  when?: Condition
  /** Drawn dashed: it waits to be placed on a picture. */
  waiting?: boolean
}

/** A line's number in its circle, read out with the part's name; a second ring where another than the designer's part fills it here. */
export function PartBalloon({ line, when, waiting = false }: PartBalloonProps) {
  const { t } = useTranslation('editingText')
  const { document, numbers, choices } = useDraft()
  const found = document.lines.find((each) => each.id === line)
  const name = found?.options[0]!.part.name ?? ''
  const number = numbers.line[line]
  const label = number === undefined ? t('balloon.gone') : t('balloon.label', { number, name })
  const shape = ['balloon', isSubstitute(document, line, choices, when) && 'substitute', waiting && 'waiting']
  return (
    <span className={shape.filter(Boolean).join(' ')} role="img" aria-label={label} title={name || undefined}>
      {number ?? '?'}
    </span>
  )
}
