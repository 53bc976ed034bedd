import { directionOf } from '../../shared/lib/language/direction'
import { escapeHtml } from './escapeHtml'
import ar from './sentences/ar.json'
import en from './sentences/en.json'

/** The mails that the site sends, with the values that each one names. `link` is a path of the site. */
export interface MailValues {
  confirm: { name: string; link: string }
  already: { name: string; link: string }
  signInLink: { name: string; link: string }
  reset: { name: string; link: string }
  passwordChanged: { name: string; link: string; when: Date }
  newEmail: { name: string; link: string }
  emailNotice: { name: string; link: string; newEmail: string }
  invitation: { link: string; inviter: string; guide: string; role: MailRole; translationLanguage: string }
  accountDeleted: { name: string; when: Date }
}
export type MailTemplate = keyof MailValues
type MailRole = 'owner' | 'author' | 'translator' | 'reviewer'

export interface ComposedMail {
  subject: string
  text: string
  html: string
  language: string
}

interface Sentences {
  subject: string
  before: string[]
  action?: string
  after: string[]
}

const LANGUAGES = { en, ar }

/** A mail in the person's language, as plain text and as HTML that needs no picture and no style sheet. */
export function composeMail<Template extends MailTemplate>(
  template: Template,
  values: MailValues[Template],
  language: string,
  site: string,
): ComposedMail {
  const known = language in LANGUAGES ? (language as keyof typeof LANGUAGES) : 'en'
  const all = LANGUAGES[known]
  const sentences: Sentences = all[template]
  const said = asText(values, known, all)
  const link = 'link' in values ? `${site}${values.link}` : undefined
  const paragraphs = {
    hello: said['name'] === undefined ? undefined : all.hello,
    before: sentences.before,
    after: [...sentences.after, all.sentBecause],
  }
  said['site'] = site
  return {
    subject: oneLine(fill(sentences.subject, said, (value) => value)),
    text: plainText(paragraphs, said, link),
    html: page(paragraphs, said, known, sentences.action, link, all.linkAlone),
    language: known,
  }
}

type Said = Record<string, string>
interface Paragraphs {
  hello: string | undefined
  before: string[]
  after: string[]
}

/** Every value as words of the language. */
function asText(values: MailValues[MailTemplate], language: string, all: typeof en): Said {
  const said: Said = {}
  for (const [name, value] of Object.entries(values) as [string, string | Date][]) {
    said[name] = value instanceof Date ? dayAndTime(value, language) : oneLine(value)
  }
  if ('role' in values) {
    const into = new Intl.DisplayNames([language], { type: 'language' })
    said['role'] = fill(
      all.role[values.role],
      { language: values.translationLanguage === '' ? '' : (into.of(values.translationLanguage) ?? '') },
      (value) => value,
    )
  }
  return said
}

const dayAndTime = (when: Date, language: string): string =>
  `${new Intl.DateTimeFormat(language === 'en' ? 'en-GB' : language, { dateStyle: 'long', timeStyle: 'short', timeZone: 'UTC' }).format(when)} UTC`

function plainText({ hello, before, after }: Paragraphs, said: Said, link: string | undefined): string {
  // First strong isolate … pop directional isolate: a Latin name inside an Arabic sentence keeps its place.
  const put = (sentence: string): string => fill(sentence, said, (value) => `\u2068${value}\u2069`)
  return [
    ...(hello === undefined ? [] : [put(hello)]),
    ...before.map(put),
    ...(link === undefined ? [] : [link]),
    ...after.map(put),
  ]
    .join('\n\n')
    .concat('\n')
}

function page(
  { hello, before, after }: Paragraphs,
  said: Said,
  language: string,
  action: string | undefined,
  link: string | undefined,
  linkAlone: string,
): string {
  const put = (sentence: string): string =>
    `<p>${fill(escapeHtml(sentence), said, (value) => `<bdi>${escapeHtml(value)}</bdi>`)}</p>`
  const address = link === undefined ? '' : escapeHtml(link)
  const button =
    link === undefined || action === undefined
      ? []
      : [
          `<p><a href="${address}" style="display:inline-block;padding:12px 18px;border:1px solid;font-weight:600">${escapeHtml(action)}</a></p>`,
          `<p><small>${escapeHtml(linkAlone)}<br><bdi dir="ltr">${address}</bdi></small></p>`,
        ]
  return [
    `<!doctype html><html lang="${language}" dir="${directionOf(language)}"><head><meta charset="utf-8"></head>`,
    '<body style="font-family:Georgia,serif;font-size:18px;line-height:27px;max-width:34em;margin:27px">',
    ...(hello === undefined ? [] : [put(hello)]),
    ...before.map(put),
    ...button,
    ...after.map(put),
    '</body></html>',
  ].join('\n')
}

function fill(sentence: string, said: Said, dress: (value: string) => string): string {
  return sentence.replace(/\{(\w+)\}/g, (whole, name: string) => {
    const value = said[name]
    return value === undefined ? whole : dress(value)
  })
}

/** What somebody typed never makes a second line, which in a head would be a head of its own. */
const oneLine = (value: string): string => value.replace(/[\s\u0000-\u001f\u007f]+/g, ' ').trim()
