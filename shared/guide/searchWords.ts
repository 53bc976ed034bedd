import { plainText, wordsOf } from './plainText'
import type { GuideDocument } from './schema'

/** Everything in a guide that somebody could look for, as plain text: for the index of the library's search. */
export function searchWords(doc: GuideDocument): string {
  const words = wordsOf(doc)
  return [
    ...doc.sections.flatMap((section) => [
      section.title,
      ...section.steps.flatMap((step) => [
        step.title,
        plainText(step.body, words),
        ...step.cautions.map((caution) => caution.hazard),
        ...step.checks.map((check) => check.text),
      ]),
    ]),
    ...doc.lines.flatMap((line) => [
      line.note,
      ...line.options.flatMap(({ part }) => [part.name, part.specification, part.designation ?? '']),
    ]),
    ...doc.tools.map((tool) => tool.name),
    ...doc.skills.map((skill) => skill.name),
    ...doc.figures.flatMap((figure) => [figure.caption, figure.alt]),
    ...doc.models.map((model) => model.name),
    ...doc.credits.map((credit) => credit.name),
  ]
    .filter((text) => text !== '')
    .join('\n')
}
