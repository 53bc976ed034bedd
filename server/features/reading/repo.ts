import { and, count, desc, eq, max, sql, type SQL } from 'drizzle-orm'
import type { LibraryQuestion } from '../../../shared/api/pages'
import { searchQuery } from '../../../shared/guide/searchWords'
import type { Db } from '../../db/open'
import { documents, guides, revisions } from '../../db/schema'

export type GuideRow = typeof guides.$inferSelect
export type RevisionRow = typeof revisions.$inferSelect

export const PAGE_SIZE = 20
/** A list to choose from stays short; the field for words finds the rest. */
const MOST_NAMES = 12

export function guideBySlug(db: Db, slug: string): GuideRow | undefined {
  return db.select().from(guides).where(eq(guides.slug, slug)).get()
}

/** Newest first. A guide's whole history is short. */
export function revisionsOf(db: Db, guideId: string): RevisionRow[] {
  return db
    .select()
    .from(revisions)
    .where(eq(revisions.guideId, guideId))
    .orderBy(desc(revisions.number))
    .all()
}

/** A number that rises with every revision, cheap to ask for: what was rendered before is thrown away when it differs. */
export function revisionMarker(db: Db): () => number {
  const newest = db
    .select({ mark: sql<number | null>`max(rowid)` })
    .from(revisions)
    .prepare()
  return () => newest.get()?.mark ?? 0
}

const latest = sql`${revisions.number} = (select max(r.number) from revision r where r.guide_id = ${revisions.guideId})`
const machine = sql<string>`json_extract(${documents.json}, '$.machine')`
const language = sql<string>`json_extract(${documents.json}, '$.lang')`
const title = sql<string>`json_extract(${documents.json}, '$.title')`

function asked(question: LibraryQuestion): SQL | undefined {
  const query = searchQuery(question.q, question.language === '' ? 'en' : question.language)
  return and(
    latest,
    query === undefined
      ? undefined
      : sql`${guides.id} in (select guide_id from guide_search where guide_search match ${query})`,
    question.machine === '' ? undefined : eq(machine, question.machine),
    question.language === '' ? undefined : eq(language, question.language),
    question.skill === '' ? undefined : names(question.skill, '$.skills'),
    question.tool === '' ? undefined : names(question.tool, '$.tools'),
  )
}

/** The document has a skill or a tool of this name. */
const names = (name: string, list: '$.skills' | '$.tools'): SQL =>
  sql`exists (select 1 from json_each(${documents.json}, ${list}) where json_extract(value, '$.name') = ${name} collate nocase)`

/** The guides that answer a question, as their latest revision has them, a page at a time. */
export function libraryPage(db: Db, question: LibraryQuestion) {
  return db
    .select({ guide: guides, revision: revisions, json: documents.json })
    .from(revisions)
    .innerJoin(guides, eq(guides.id, revisions.guideId))
    .innerJoin(documents, eq(documents.hash, revisions.documentHash))
    .where(asked(question))
    .orderBy(
      question.sort === 'title' ? sql`${title} collate nocase` : desc(revisions.publishedAt),
      guides.id,
    )
    .limit(PAGE_SIZE)
    .offset((question.page - 1) * PAGE_SIZE)
    .all()
}

export function libraryTotal(db: Db, question: LibraryQuestion): number {
  return libraryRows(db, question, sql`1`)[0]?.count ?? 0
}

/** How many guides there are of each kind of machine, and in each language, among those that answer the rest of the question. */
export function facetOf(db: Db, question: LibraryQuestion, facet: 'machine' | 'language') {
  const rest = { ...question, [facet]: '' }
  return libraryRows(db, rest, facet === 'machine' ? machine : language)
}

/** The commonest names of skills or tools among the guides that answer the rest of the question, and how many guides have each. */
export function namesOf(db: Db, question: LibraryQuestion, facet: 'skill' | 'tool') {
  const list = facet === 'skill' ? '$.skills' : '$.tools'
  const name = sql<string>`json_extract(each.value, '$.name')`
  return db
    .select({ value: name, count: sql<number>`count(distinct ${guides.id})` })
    .from(revisions)
    .innerJoin(guides, eq(guides.id, revisions.guideId))
    .innerJoin(documents, eq(documents.hash, revisions.documentHash))
    .innerJoin(sql`json_each(${documents.json}, ${list}) as each`, sql`1`)
    .where(and(asked({ ...question, [facet]: '' }), sql`${name} <> ''`))
    .groupBy(sql`${name} collate nocase`)
    .orderBy(sql`2 desc`, name)
    .limit(MOST_NAMES)
    .all()
}

function libraryRows(db: Db, question: LibraryQuestion, by: SQL) {
  return db
    .select({ value: sql<string>`${by}`, count: count() })
    .from(revisions)
    .innerJoin(guides, eq(guides.id, revisions.guideId))
    .innerJoin(documents, eq(documents.hash, revisions.documentHash))
    .where(asked(question))
    .groupBy(by)
    .orderBy(desc(count()))
    .all()
}

/** The newest revisions of the library or of one guide, for feeds. */
export function newestRevisions(db: Db, guideId: string | undefined, limit: number) {
  return db
    .select({ guide: guides, revision: revisions, title })
    .from(revisions)
    .innerJoin(guides, eq(guides.id, revisions.guideId))
    .innerJoin(documents, eq(documents.hash, revisions.documentHash))
    .where(guideId === undefined ? undefined : eq(revisions.guideId, guideId))
    .orderBy(desc(revisions.publishedAt))
    .limit(limit)
    .all()
}

/** Every published guide with the time of its latest revision and its number of steps, for the sitemap. */
export function allSlugs(db: Db) {
  return db
    .select({ slug: guides.slug, at: max(revisions.publishedAt) })
    .from(revisions)
    .innerJoin(guides, eq(guides.id, revisions.guideId))
    .groupBy(guides.slug)
    .all()
}
