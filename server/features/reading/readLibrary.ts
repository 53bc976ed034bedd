import { z } from 'zod'
import type { LibraryData, LibraryEntry, LibraryQuestion } from '../../../shared/api/pages'
import { numbering } from '../../../shared/guide/numbering'
import { resolve } from '../../../shared/guide/resolve'
import { GuideDocument, MachineKind } from '../../../shared/guide/schema'
import { stepsOf } from '../../../shared/guide/stepsOf'
import type { Context } from '../../context'
import { presentFile } from '../../files/presentFile'
import { readFiles } from '../../files/repo'
import { facetOf, libraryPage, libraryTotal, namesOf, PAGE_SIZE } from './repo'

/** A question from the address. What makes no sense is taken as not asked: a reader's address never fails. */
export const Question: z.ZodType<LibraryQuestion> = z.object({
  q: z.string().max(200).catch(''),
  machine: z.string().max(40).catch(''),
  language: z.string().max(35).catch(''),
  skill: z.string().max(300).catch(''),
  tool: z.string().max(300).catch(''),
  sort: z.enum(['date', 'title']).catch('date'),
  page: z.coerce.number().int().min(1).max(10_000).catch(1),
})

export function readLibrary(ctx: Context, question: LibraryQuestion): LibraryData {
  return {
    question,
    entries: libraryPage(ctx.db, question).map((row) => entryOf(ctx, row)),
    total: libraryTotal(ctx.db, question),
    pageSize: PAGE_SIZE,
    machines: facetOf(ctx.db, question, 'machine').flatMap(({ value, count }) => {
      const kind = MachineKind.safeParse(value)
      return kind.success ? [{ value: kind.data, count }] : []
    }),
    languages: facetOf(ctx.db, question, 'language'),
    skills: namesOf(ctx.db, question, 'skill'),
    tools: namesOf(ctx.db, question, 'tool'),
  }
}

function entryOf(ctx: Context, row: ReturnType<typeof libraryPage>[number]): LibraryEntry {
  const doc = resolve(GuideDocument.parse(JSON.parse(row.json)))
  const steps = stepsOf(doc)
  return {
    slug: row.guide.slug,
    title: doc.title,
    summary: doc.summary,
    byline: row.guide.byline,
    lang: doc.lang,
    machine: doc.machine,
    label: row.revision.label,
    publishedAt: row.revision.publishedAt.toISOString(),
    minutes: steps.reduce((sum, step) => sum + (step.minutes ?? 0), 0),
    steps: numbering(doc).steps,
    lines: doc.lines.length,
    skills: doc.skills.map(({ name }) => name),
    claim: doc.claims.find(({ evidence }) => evidence.kind !== 'none') ?? doc.claims[0] ?? null,
    picture: pictureOf(ctx, doc),
  }
}

/** The front figure small, or else the first figure of a step. */
function pictureOf(ctx: Context, doc: GuideDocument): LibraryEntry['picture'] {
  const wanted = doc.front ?? stepsOf(doc).flatMap(({ figures }) => figures)[0]
  const figure = doc.figures.find(({ id }) => id === wanted)
  if (figure === undefined || figure.asset === null) return null
  const file = readFiles(ctx.db, [figure.asset]).map(presentFile)[0]
  const made =
    file?.renditions.find(({ name }) => name === 'still') ??
    file?.renditions.find(({ name }) => name.startsWith('webp-'))
  if (file === undefined || made === undefined) return null
  return {
    sha256: file.sha256,
    rendition: made.name,
    width: made.width ?? file.picture?.width ?? 400,
    height: made.height ?? file.picture?.height ?? 300,
    alt: figure.alt,
  }
}
