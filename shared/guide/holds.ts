import type { Id } from '../lib/ids/id'
import type { Condition, GuideDocument, Line } from './schema'

/** The option chosen for each line that has one chosen; a line that is not named has the designer's, its first. */
export type Choices = Readonly<Record<Id, Id>>

/** The option that fills a line under these choices; an unknown choice falls back to the designer's. */
export function chosenOption(line: Line, choices: Choices): Line['options'][number] {
  return line.options.find((option) => option.id === choices[line.id]) ?? line.options[0]!
}

/**
 * Whether a condition holds. A clause on a line that is not there, or that itself is absent under these choices, does not hold.
 * A line whose condition leads back to itself counts as absent.
 */
export function holds(doc: GuideDocument, choices: Choices, when: Condition | undefined): boolean {
  return (when ?? []).every((clause) => clauseHolds(doc, choices, clause, new Set()))
}

function clauseHolds(
  doc: GuideDocument,
  choices: Choices,
  clause: Condition[number],
  asked: ReadonlySet<Id>,
): boolean {
  const line = lineById(doc, clause.line)
  if (line === undefined || asked.has(line.id)) return false
  const further = new Set(asked).add(line.id)
  const present = (line.when ?? []).every((outer) => clauseHolds(doc, choices, outer, further))
  return present && clause.is.includes(chosenOption(line, choices).id)
}

/** Lines by their ids, kept as long as the very list is: conditions are asked by the thousand, and edits share what they leave alone. */
const byId = new WeakMap<readonly Line[], ReadonlyMap<Id, Line>>()

/** The line with this id, or undefined. Cost O(1) but for the first time with a list. */
export function lineById(doc: GuideDocument, id: Id): Line | undefined {
  let known = byId.get(doc.lines)
  if (known === undefined) {
    known = new Map(doc.lines.map((line) => [line.id, line]))
    byId.set(doc.lines, known)
  }
  return known.get(id)
}
