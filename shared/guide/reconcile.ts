import Big from 'big.js'
import type { Id } from '../lib/ids/id'
import { convert, type UnitCode } from '../lib/units/units'
import { setNode } from './edit'
import { holds, type Choices } from './holds'
import type { GuideDocument, Line, Quantity, Step, Use } from './schema'
import { stepsOf } from './stepsOf'

/**
 * How a line's quantity stands to what the steps use. `unused`: no step takes it. `as needed`: the steps do not
 * say how many (the list may).
 * `units differ`: a use is in a unit that does not convert into the line's. `no quantity`: the steps count, the list does not.
 */
export type Balance =
  'even' | 'more used' | 'more listed' | 'unused' | 'as needed' | 'units differ' | 'no quantity'

export interface Reconciled {
  line: Id
  balance: Balance
  listed: Quantity | null
  /** The sum of the steps' uses in the line's unit (or in the first use's where the line has none); null where it has no sum. */
  used: Quantity | null
  /** The steps that take it, in reading order. */
  steps: Id[]
}

export interface Reconciliation {
  lines: Reconciled[]
  /** Uses of a line that the list does not have. */
  unlisted: { step: Id; use: Id; line: Id }[]
}

/** A use with the step that it stands in. */
export interface UseInStep {
  step: Step
  use: Use
}

/** All uses by the line that they take from, in reading order; also those of lines that the list does not have. */
export function usesByLine(doc: GuideDocument): ReadonlyMap<Id, UseInStep[]> {
  const uses = new Map<Id, UseInStep[]>()
  for (const step of stepsOf(doc)) {
    for (const use of step.uses) {
      const found = uses.get(use.line)
      if (found === undefined) uses.set(use.line, [{ step, use }])
      else found.push({ step, use })
    }
  }
  return uses
}

/** For each line that is there under these choices: what the steps use against what the list asks for. Sums are exact. Cost O(nodes). */
export function reconcile(doc: GuideDocument, choices: Choices = {}): Reconciliation {
  const uses = usesByLine(doc)
  const listed = new Set(doc.lines.map((line) => line.id))
  return {
    lines: doc.lines
      .filter((line) => holds(doc, choices, line.when))
      .map((line) => reconcileLine(doc, line, uses.get(line.id) ?? [], choices)),
    unlisted: [...uses.entries()]
      .filter(([line]) => !listed.has(line))
      .flatMap(([line, found]) => found.map(({ step, use }) => ({ step: step.id, use: use.id, line }))),
  }
}

/** One line against its uses, of which those count that are there under these choices. */
export function reconcileLine(
  doc: GuideDocument,
  line: Line,
  uses: readonly UseInStep[],
  choices: Choices,
): Reconciled {
  const present = uses.filter(
    ({ step, use }) => holds(doc, choices, step.when) && holds(doc, choices, use.when),
  )
  const steps = [...new Set(present.map(({ step }) => step.id))]
  const counted = present.flatMap(({ use }) => (use.quantity === null ? [] : [use.quantity]))
  const unit = line.quantity?.unit ?? counted[0]?.unit ?? 'each'
  const used = counted.length === 0 ? null : sumIn(unit, counted)
  const found = { line: line.id, listed: line.quantity, used: used ?? null, steps }
  if (present.length === 0) return { ...found, balance: 'unused' }
  if (used === undefined) return { ...found, balance: 'units differ' }
  if (used === null) return { ...found, balance: 'as needed' }
  if (line.quantity === null) return { ...found, balance: 'no quantity' }
  const difference = Big(used.value).cmp(line.quantity.value)
  return { ...found, balance: difference === 0 ? 'even' : difference > 0 ? 'more used' : 'more listed' }
}

/** The exact sum of quantities in one unit; undefined where one does not convert. */
export function sumIn(unit: UnitCode, quantities: readonly Quantity[]): Quantity | undefined {
  let sum = Big(0)
  for (const quantity of quantities) {
    const value = convert(quantity.value, quantity.unit, unit)
    if (value === undefined) return undefined
    sum = sum.plus(value)
  }
  return { value: sum.round(9).toFixed(), unit }
}

/**
 * The line's quantity as the steps have it. A line that no step uses is left as it is: whether to drop it is for a person to say.
 * @returns the same document where there is nothing to take.
 */
export function takeFromSteps(doc: GuideDocument, lineId: Id, choices: Choices = {}): GuideDocument {
  const line = doc.lines.find(({ id }) => id === lineId)
  if (line === undefined || !holds(doc, choices, line.when)) return doc
  const { used, balance } = reconcileLine(doc, line, usesByLine(doc).get(lineId) ?? [], choices)
  return used === null || balance === 'even' ? doc : setNode(doc, 'line', lineId, { quantity: used })
}
