import type { Id } from '../lib/ids/id'
import type { Condition, GuideDocument, Step } from './schema'

/** The numbers that a reader sees. They are derived from order and never stored. */
export interface Numbering {
  /** "A", "B" … "Z", "AA". */
  section: Record<Id, string>
  /** 1, 2 … through the whole guide; steps that exclude each other share one. */
  step: Record<Id, number>
  /** The balloon: the line's place in the list. */
  line: Record<Id, number>
  /** "7.2": the second figure of step 7; the front page's figure is "1" where the guide has one. */
  figure: Record<Id, string>
  /** "7.1": the first check of step 7. */
  check: Record<Id, string>
  steps: number
}

/** Numbers a document, resolved or not. Cost O(nodes). */
export function numbering(doc: GuideDocument): Numbering {
  const numbers: Numbering = { section: {}, step: {}, line: {}, figure: {}, check: {}, steps: 0 }
  doc.lines.forEach((line, index) => (numbers.line[line.id] = index + 1))
  if (doc.front !== null) numbers.figure[doc.front] = '1'
  let group: Step[] = []
  doc.sections.forEach((section, index) => {
    numbers.section[section.id] = letters(index)
    group = []
    for (const step of section.steps) {
      if (group.length > 0 && group.every((other) => excludes(other.when, step.when))) group.push(step)
      else {
        group = [step]
        numbers.steps += 1
      }
      numbers.step[step.id] = numbers.steps
      let figure = 0
      for (const id of step.figures) numbers.figure[id] ??= `${numbers.steps}.${(figure += 1)}`
      step.checks.forEach((check, place) => (numbers.check[check.id] = `${numbers.steps}.${place + 1}`))
    }
  })
  return numbers
}

/** Two conditions can never hold together: they ask for different options of one line. */
function excludes(a: Condition | undefined, b: Condition | undefined): boolean {
  return (a ?? []).some((clause) =>
    (b ?? []).some(
      (other) => other.line === clause.line && !other.is.some((option) => clause.is.includes(option)),
    ),
  )
}

/** 0 → A, 25 → Z, 26 → AA. */
export function letters(index: number): string {
  return index < 26
    ? String.fromCharCode(65 + index)
    : letters(Math.floor(index / 26) - 1) + letters(index % 26)
}
