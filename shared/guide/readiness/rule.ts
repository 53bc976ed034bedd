import type { Id } from '../../lib/ids/id'
import { UNITS } from '../../lib/units/units'
import type { Facts } from '../facts'
import type { Finding, FindingPlace } from '../finding'
import { numbering, type Numbering } from '../numbering'
import { wordsOf, type Words } from '../plainText'
import { quantityText } from '../quantityText'
import { usesByLine, type UseInStep } from '../reconcile'
import { targetsOf } from '../resolve'
import type { Figure, GuideDocument, Line, Measure, Step } from '../schema'
import { stepsOf } from '../stepsOf'
import type { Target } from '../withoutReferences'

/** A document as the rules look at it: with what many of them need, worked out once. */
export interface Look {
  doc: GuideDocument
  facts: Facts
  numbers: Numbering
  words: Words
  steps: readonly Step[]
  uses: ReadonlyMap<Id, UseInStep[]>
  targets: Record<Target, ReadonlySet<Id>>
  /** Figures that a reader sees, each where it is seen first. Others wait in the document and are not judged. */
  shown: readonly { figure: Figure; step: Step | null }[]
}

export type Values = Finding['values']
export interface Found {
  place: FindingPlace
  values?: Values
}

/** One rule: whether it must be kept, where it is not, and whether the document has anything that it concerns (else it is not counted). */
export interface Rule {
  must: boolean
  find: (look: Look) => Found[]
  concerns?: (look: Look) => boolean
}

export function lookAt(doc: GuideDocument, facts: Facts): Look {
  const numbers = numbering(doc)
  const steps = stepsOf(doc)
  return {
    doc,
    facts,
    numbers,
    words: wordsOf(doc, numbers),
    steps,
    uses: usesByLine(doc),
    targets: targetsOf(doc),
    shown: shownFigures(doc, steps),
  }
}

function shownFigures(doc: GuideDocument, steps: readonly Step[]): Look['shown'] {
  const figures = new Map(doc.figures.map((figure) => [figure.id, figure]))
  const shown = new Map<Id, { figure: Figure; step: Step | null }>()
  const see = (id: Id, step: Step | null): void => {
    const figure = figures.get(id)
    if (figure !== undefined && !shown.has(id)) shown.set(id, { figure, step })
  }
  if (doc.front !== null) see(doc.front, null)
  for (const step of steps) for (const id of step.figures) see(id, step)
  return [...shown.values()]
}

export const onGuide = (field: string | null, node: Id | null = null): FindingPlace => ({
  page: 'guide',
  step: null,
  node,
  field,
})
export const onParts = (node: Id | null, field: string | null): FindingPlace => ({
  page: 'parts',
  step: null,
  node,
  field,
})
export const onStep = (step: Id, node: Id | null, field: string | null): FindingPlace => ({
  page: 'step',
  step,
  node,
  field,
})
/** A place on the step, or on the guide's own page where there is no step. */
export const onStepOrGuide = (step: Step | null, node: Id | null, field: string): FindingPlace =>
  step === null ? onGuide(field, node) : onStep(step.id, node, field)

export const isBlank = (text: string): boolean => text.trim() === ''

/** Stands for a name that is still empty. */
const NAMELESS = '…'
export const orNameless = (name: string): string => (isBlank(name) ? NAMELESS : name)

/** A line as a sentence names it: its balloon and the designer's part. */
export const lineValues = ({ numbers }: Look, line: Line): Values => ({
  line: numbers.line[line.id]!,
  name: orNameless(line.options[0]!.part.name),
})

export const stepNumber = ({ numbers }: Look, step: Step): number => numbers.step[step.id]!

/**
 * A quantity for a sentence: `used` its text, `usedWord` the unit that is a word ("pair") and has one in each language, or "none".
 */
export function amountValues(name: string, quantity: Measure): Values {
  const counted = UNITS[quantity.unit].dimension === 'count' && quantity.unit !== 'each'
  return {
    [name]: counted ? quantity.value : quantityText(quantity),
    [`${name}Word`]: counted ? quantity.unit : 'none',
  }
}
