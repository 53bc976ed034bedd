import type { Id } from '../lib/ids/id'
import { holds, lineById, type Choices } from './holds'
import type { Condition, GuideDocument, Line } from './schema'

type When = Condition | undefined

/** More sets than these are not gone through: a condition that hangs on so many lines cannot be read either. */
const MOST_SETS = 4096

/**
 * Every set of choices that can make a difference to these conditions: all options of the lines that they name, and of the lines on which
 * those depend. One empty set where nothing is to be chosen. At most 4096 sets, the designer's options first.
 */
export function choicesFor(doc: GuideDocument, conditions: readonly When[]): Choices[] {
  let sets: Choices[] = [{}]
  for (const line of decidingLines(doc, conditions)) {
    if (sets.length * line.options.length > MOST_SETS) break
    sets = sets.flatMap((set) => line.options.map((option) => ({ ...set, [line.id]: option.id })))
  }
  return sets
}

function decidingLines(doc: GuideDocument, conditions: readonly When[]): Line[] {
  const found = new Map<Id, Line>()
  const look = (when: When): void => {
    for (const clause of when ?? []) {
      const line = found.has(clause.line) ? undefined : lineById(doc, clause.line)
      if (line === undefined) continue
      found.set(line.id, line)
      look(line.when)
    }
  }
  conditions.forEach(look)
  return [...found.values()]
}

/** The first set of choices under which all of `present` hold and `absent` does not; undefined where there is none. */
export function choicesWithout(
  doc: GuideDocument,
  present: readonly When[],
  absent: When,
): Choices | undefined {
  if ((absent ?? []).length === 0) return undefined
  return choicesFor(doc, [...present, absent]).find(
    (choices) => present.every((when) => holds(doc, choices, when)) && !holds(doc, choices, absent),
  )
}

/** The names of what is chosen, for a sentence: "Alternator 24 V, Tube 60". */
export function namesOfChoices(doc: GuideDocument, choices: Choices): string {
  return doc.lines
    .flatMap((line) => line.options.filter((option) => choices[line.id] === option.id))
    .map((option) => option.part.name)
    .join(', ')
}
