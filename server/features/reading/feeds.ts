import type { Context } from '../../context'
import { allSlugs, guideBySlug, newestRevisions } from './repo'

const NEWEST = 50

const escaped = (text: string): string =>
  text
    .replace(/[&<>"]/g, (letter) => ({ '&': '&amp;', '<': '&lt;', '>': '&gt;', '"': '&quot;' })[letter]!)
    // Control letters, which XML 1.0 has no place for.
    .replace(/(?![\n\t])\p{Cc}/gu, '')

/** Atom (RFC 4287): the newest revisions of the library, or of one guide. Undefined for a guide that does not exist. */
export function atomFeed(ctx: Context, slug?: string): string | undefined {
  const guide = slug === undefined ? undefined : guideBySlug(ctx.db, slug)
  if (slug !== undefined && guide === undefined) return undefined
  const rows = newestRevisions(ctx.db, guide?.id, NEWEST)
  if (slug !== undefined && rows.length === 0) return undefined
  const { appUrl } = ctx.config
  const self =
    slug === undefined ? `${appUrl}/feed.atom` : `${appUrl}/guides/${encodeURIComponent(slug)}/feed.atom`
  const updated = rows[0]?.revision.publishedAt ?? new Date(0)
  const entries = rows.map(({ guide: of, revision, title }) => {
    const address = `${appUrl}/guides/${encodeURIComponent(of.slug)}/revisions/${encodeURIComponent(revision.label)}`
    return `<entry><id>${escaped(address)}</id><title>${escaped(`${title}, ${revision.label}`)}</title><link href="${escaped(address)}"/><updated>${revision.publishedAt.toISOString()}</updated><author><name>${escaped(of.byline)}</name></author><summary>${escaped(revision.note)}</summary></entry>`
  })
  const heading = slug === undefined ? 'Quern' : (rows[0]?.title ?? slug)
  return `<?xml version="1.0" encoding="utf-8"?>\n<feed xmlns="http://www.w3.org/2005/Atom"><id>${escaped(self)}</id><title>${escaped(heading)}</title><link rel="self" href="${escaped(self)}"/><updated>${updated.toISOString()}</updated>${entries.join('')}</feed>\n`
}

/** sitemaps.org: the library and the front page of every published guide. */
export function sitemap(ctx: Context): string {
  const { appUrl } = ctx.config
  const urls = allSlugs(ctx.db).map(
    ({ slug, at }) =>
      `<url><loc>${escaped(`${appUrl}/guides/${encodeURIComponent(slug)}`)}</loc>${at === null ? '' : `<lastmod>${at.toISOString()}</lastmod>`}</url>`,
  )
  return `<?xml version="1.0" encoding="utf-8"?>\n<urlset xmlns="http://www.sitemaps.org/schemas/sitemap/0.9"><url><loc>${escaped(appUrl)}/guides</loc></url>${urls.join('')}</urlset>\n`
}
