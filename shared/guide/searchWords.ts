import { plainText, wordsOf } from './plainText'
import type { GuideDocument } from './schema'

/**
 * The words of a guide for an index of full text, one space between them. Scripts without spaces (Thai, Chinese, Japanese …) are cut
 * by the language's rules, so that an index that splits at spaces finds their words too. Title and summary are not in it: they have
 * columns of their own, see `cutWords`.
 */
export function searchWords(doc: GuideDocument): string {
  const words = wordsOf(doc)
  const texts = [
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
  return cutWords(texts.join('\n'), doc.lang)
}

/**
 * Pieces of at most 200 characters, cut at a blank or a sign where there is one. `Intl.Segmenter` of Node 20 keeps the whole text once more
 * for each of its words: 180 KB at once took all memory and ended the process.
 */
const PIECES = /.{1,200}(?![\p{L}\p{M}\p{N}])|.{1,200}/gsu

/** A text cut into its words, one space between them, signs left out. */
export function cutWords(text: string, lang: string): string {
  const segmenter = new Intl.Segmenter(lang, { granularity: 'word' })
  const words: string[] = []
  for (const [piece] of text.normalize('NFKC').matchAll(PIECES)) {
    for (const { segment, isWordLike } of segmenter.segment(piece)) if (isWordLike) words.push(segment)
  }
  return words.join(' ')
}

/** Longer questions than these are cut off: an index need not be asked for a whole page. */
const MOST_WORDS = 16
const LONGEST = 400

/**
 * What somebody typed, as a query of SQLite's FTS5: every word must be there, the last one may go on. Each word is quoted, so that
 * nothing typed is taken for an operator or a column. `lang` is the interface's language; it only decides how scripts without spaces
 * are cut. @returns undefined where nothing was typed that could be looked for.
 */
export function searchQuery(typed: string, lang: string): string | undefined {
  const words = cutWords(typed.slice(0, LONGEST), lang)
    .split(' ')
    .filter((word) => word !== '')
    .slice(0, MOST_WORDS)
  if (words.length === 0) return undefined
  const goesOn = !/\s$/u.test(typed)
  return words
    .map((word, index) => `"${word.replaceAll('"', '""')}"${goesOn && index === words.length - 1 ? '*' : ''}`)
    .join(' ')
}
