import type { GuideData } from '../../../shared/api/pages'
import { fileAddress } from '../../../shared/api/files'
import { numbering } from '../../../shared/guide/numbering'
import { plainText, wordsOf } from '../../../shared/guide/plainText'
import { quantityText } from '../../../shared/guide/quantityText'
import { resolve } from '../../../shared/guide/resolve'

/** The guide as schema.org's HowTo, for search engines. Text only: the renderer escapes it for its place. */
export function structuredData(guide: GuideData, origin: string): string {
  const doc = resolve(guide.document)
  const numbers = numbering(doc)
  const words = wordsOf(doc)
  const address = `${origin}/guides/${guide.slug}`
  const minutes = doc.sections
    .flatMap(({ steps }) => steps)
    .reduce((sum, step) => sum + (step.minutes ?? 0), 0)
  const picture = pictureOf(guide)
  const data = {
    '@context': 'https://schema.org',
    '@type': 'HowTo',
    name: doc.title,
    description: doc.summary,
    inLanguage: doc.lang,
    datePublished: guide.revision.publishedAt,
    version: guide.revision.label,
    license: `https://spdx.org/licenses/${encodeURIComponent(doc.licence)}.html`,
    author: doc.credits.map(({ name }) => ({ '@type': 'Person', name })),
    ...(picture !== null && { image: `${origin}${picture}` }),
    ...(minutes > 0 && { totalTime: `PT${minutes}M` }),
    tool: doc.tools.map(({ name }) => ({ '@type': 'HowToTool', name })),
    supply: doc.lines.map((line) => ({
      '@type': 'HowToSupply',
      name: line.options[0]!.part.name,
      ...(line.quantity !== null && { requiredQuantity: quantityText(line.quantity) }),
    })),
    step: doc.sections.map((section) => ({
      '@type': 'HowToSection',
      name: section.title === '' ? numbers.section[section.id] : section.title,
      itemListElement: section.steps.map((step) => ({
        '@type': 'HowToStep',
        name: step.title,
        url: `${address}/steps/${numbers.step[step.id]}`,
        text: plainText(step.body, words),
      })),
    })),
  }
  // `<` could end the script element; in JSON it may be written so.
  return JSON.stringify(data).replaceAll('<', '\\u003c')
}

/** The address of a raster picture of the front figure, or null. */
export function pictureOf(guide: GuideData): string | null {
  const front = guide.document.figures.find(({ id }) => id === guide.document.front)
  const file = guide.files.find(({ sha256 }) => sha256 === front?.asset)
  const made =
    file?.renditions.find(({ name }) => name === 'webp-960') ??
    file?.renditions.find(({ name }) => /^webp|^still-png/.test(name))
  return file === undefined || made === undefined ? null : fileAddress(file.sha256, made.name)
}
