import type { Id } from '../../../../shared/lib/ids/id'
import { useDraft } from '../draftStore'

/** A line's number in its circle; a second ring where the line has substitutes. */
export function Balloon({ line }: { line: Id }) {
  const { document, numbers } = useDraft()
  const substitutes = (document.lines.find((each) => each.id === line)?.options.length ?? 1) > 1
  return <span className={substitutes ? 'balloon substitute' : 'balloon'}>{numbers.line[line] ?? '?'}</span>
}
