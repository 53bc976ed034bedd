import Big from 'big.js'
import type { Id } from '../lib/ids/id'
import { convert, type UnitCode } from '../lib/units/units'
import type { Choices } from './holds'
import { resolve } from './resolve'
import type { GuideDocument, Line, Quantity } from './schema'

/**
 * How a line's quantity stands to what the steps use. `unused`: no step takes it. `as needed`: neither side counts.
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

/** For each line: what the steps use against what the list asks for, under these choices. Sums are exact. */
export function reconcile(doc: GuideDocument, choices: Choices = {}): Reconciliation {
  const all = new Set(doc.lines.map((line) => line.id))
  const unlisted = doc.sections.flatMap((section) =>
    section.steps.flatMap((step) =>
      step.uses
        .filter((use) => !all.has(use.line))
        .map((use) => ({ step: step.id, use: use.id, line: use.line })),
    ),
  )
  const present = resolve(doc, choices)
  return { lines: present.lines.map((line) => balanceOf(present, line)), unlisted }
}

function balanceOf(doc: GuideDocument, line: Line): Reconciled {
  const uses = doc.sections.flatMap((section) =>
    section.steps.flatMap((step) =>
      step.uses
        .filter((use) => use.line === line.id)
        .map((use) => ({ step: step.id, quantity: use.quantity })),
    ),
  )
  const steps = [...new Set(uses.map((use) => use.step))]
  const counted = uses.flatMap((use) => (use.quantity === null ? [] : [use.quantity]))
  const unit = line.quantity?.unit ?? counted[0]?.unit ?? 'each'
  const used = counted.length === 0 ? null : sumIn(unit, counted)
  const found = { line: line.id, listed: line.quantity, used: used ?? null, steps }
  if (uses.length === 0) return { ...found, balance: 'unused' }
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
  const found = reconcile(doc, choices).lines.find((entry) => entry.line === lineId)
  if (found === undefined || found.used === null || found.balance === 'even') return doc
  const { used } = found
  return { ...doc, lines: doc.lines.map((line) => (line.id === lineId ? { ...line, quantity: used } : line)) }
}
