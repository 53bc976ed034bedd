import type { Choices } from '../../../../shared/guide/holds'
import { reconcileLine, usesByLine, type Reconciled } from '../../../../shared/guide/reconcile'
import type { GuideDocument } from '../../../../shared/guide/schema'
import type { Id } from '../../../../shared/lib/ids/id'

/** The choices under which a line is there: those made, and the first that its condition asks for. */
export function choicesFor({ lines }: GuideDocument, id: Id, choices: Choices): Choices {
  const when = lines.find((line) => line.id === id)?.when ?? []
  return { ...choices, ...Object.fromEntries(when.map(({ line, is }) => [line, is[0]!])) }
}

/** Each line against the steps, where it is there: also those that only come with a substitute. */
export function balancesOf(doc: GuideDocument, choices: Choices): ReadonlyMap<Id, Reconciled> {
  const uses = usesByLine(doc)
  return new Map(
    doc.lines.map((line) => [
      line.id,
      reconcileLine(doc, line, uses.get(line.id) ?? [], choicesFor(doc, line.id, choices)),
    ]),
  )
}
