import { plainText } from '../plainText'
import { isLicence } from '../licences'
import { isBlank, onGuide, onStep, type Look, type Rule } from './rule'

/** Rules about the guide as a whole. */
export const frontRules = {
  'title-missing': {
    must: true,
    find: ({ doc }) => (isBlank(doc.title) ? [{ place: onGuide('title') }] : []),
  },
  'summary-missing': {
    must: true,
    find: ({ doc }) => (isBlank(doc.summary) ? [{ place: onGuide('summary') }] : []),
  },
  'licence-missing': {
    must: true,
    find: ({ doc }) => (isBlank(doc.licence) ? [{ place: onGuide('licence') }] : []),
  },
  'licence-unknown': {
    must: true,
    find: ({ doc: { licence } }) =>
      isBlank(licence) || isLicence(licence) ? [] : [{ place: onGuide('licence'), values: { licence } }],
    concerns: ({ doc }) => !isBlank(doc.licence),
  },
  'step-none': {
    must: true,
    find: ({ steps }) => (steps.length === 0 ? [{ place: onGuide(null) }] : []),
  },
  'language-differs': {
    must: false,
    find: (look) =>
      isInScriptOfLanguage(look) ? [] : [{ place: onGuide('lang'), values: { lang: look.doc.lang } }],
  },
  'front-figure-missing': {
    must: false,
    find: ({ doc }) => (doc.front === null ? [{ place: onGuide('front') }] : []),
  },
  'tool-none': {
    must: false,
    find: ({ doc, steps }) =>
      doc.tools.length > 0
        ? []
        : [{ place: steps[0] === undefined ? onGuide(null) : onStep(steps[0].id, null, 'tools') }],
  },
  'caution-none': {
    must: false,
    find: ({ doc, steps }) =>
      doc.cautions.length > 0 || steps.some((step) => step.cautions.length > 0)
        ? []
        : [{ place: onGuide('cautions') }],
  },
  'claim-unproved': {
    must: false,
    find: ({ doc }) =>
      doc.claims
        .filter(({ evidence }) => evidence.kind === 'none' || isBlank(evidence.text))
        .map(({ id, label }) => ({ place: onGuide('evidence', id), values: { label } })),
    concerns: ({ doc }) => doc.claims.length > 0,
  },
} satisfies Record<string, Rule>

/** Scripts that are one Unicode script each. Japanese, Korean and Chinese are written in several and are not judged. */
const ONE_SCRIPT =
  /^(Latn|Arab|Hebr|Cyrl|Grek|Deva|Beng|Taml|Telu|Gujr|Knda|Mlym|Guru|Sinh|Thai|Laoo|Mymr|Khmr|Ethi|Armn|Geor)$/
/** Below this, a text says too little of its language. */
const LEAST_LETTERS = 30

/** Whether most letters of the guide's words are of the script in which its language is written. */
function isInScriptOfLanguage({ doc, steps, words }: Look): boolean {
  const script = new Intl.Locale(doc.lang).maximize().script
  if (script === undefined || !ONE_SCRIPT.test(script)) return true
  const said = [doc.title, doc.summary, ...steps.slice(0, 20).map((step) => plainText(step.body, words))]
  const letters = said.join(' ').match(/\p{L}/gu) ?? []
  const own = new RegExp(`\\p{Script=${script}}`, 'u')
  return (
    letters.length < LEAST_LETTERS || letters.filter((letter) => own.test(letter)).length * 2 > letters.length
  )
}
