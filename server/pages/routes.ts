import { readFileSync } from 'node:fs'
import type { IncomingMessage, ServerResponse } from 'node:http'
import path from 'node:path'
import { Router, type Request, type Response } from 'express'
import type { PageData } from '../../shared/api/pages'
import { numbering } from '../../shared/guide/numbering'
import { resolve } from '../../shared/guide/resolve'
import type { Context } from '../context'
import { rootDir } from '../db/open'
import { atomFeed, sitemap } from '../features/reading/feeds'
import { readGuide } from '../features/reading/readGuide'
import { Question, readLibrary } from '../features/reading/readLibrary'
import { revisionMarker } from '../features/reading/repo'
import { answerPacked, KeptPages, packPage } from './keptPages'
import { languageOf } from './languageOf'
import type { Renderer } from './renderer'

/** Addresses that the application draws in the browser. */
const APPLICATION = [
  '/sign-in',
  '/sign-in/link',
  '/sign-up',
  '/confirm',
  '/reset',
  '/invitations/:token',
  '/account',
  '/account/*rest',
  '/drafts',
  '/drafts/*rest',
  '/bring',
  '/bring/*rest',
  '/people',
  '/mail',
  '/mail/:mailId',
]

type Place = 'front' | 'steps' | 'parts' | 'models' | 'revisions'

/** The addresses of all pages: reading pages first, then the application's shell for its own. */
export function pageRoutes(
  ctx: Context,
  renderer: Renderer,
): { routes: Router; serveKept: (req: IncomingMessage, res: ServerResponse) => boolean } {
  const routes = Router()
  const mark = revisionMarker(ctx.db)
  const kept = new KeptPages(mark, ctx.now)

  /** Reads and renders a page, keeps it and answers with it. */
  async function send(req: Request, res: Response, read: () => PageData): Promise<void> {
    const before = mark()
    const data = read()
    const [render, parts] = await Promise.all([renderer.render(), renderer.parts()])
    const { appUrl: origin, demo } = ctx.config
    const html = render({ data, language: languageOf(req), origin, path: req.path, ...parts, demo })
    res.type('html').vary('Accept-Encoding').vary('Accept-Language').vary('Cookie')
    res.set('cache-control', cachingOf(data))
    const headers = { ...res.getHeaders() }
    answerPacked(req, res, await packPage(html, headers, 'quickly'), data.page === 'missing' ? 404 : 200)
    if (isLasting(data)) await kept.keepWhenPacked(keyOf(req), before, () => packPage(html, headers, 'small'))
  }

  const guidePage = (place: Place) => async (req: Request, res: Response) => {
    await send(req, res, () => {
      const guide = readGuide(ctx, part(req, 'slug') ?? '', part(req, 'label'))
      return guide === undefined ? { page: 'missing' } : { page: place, guide }
    })
  }

  routes.get('/', (_req, res) => res.redirect(302, '/guides'))
  routes.get('/guides', (req, res) =>
    send(req, res, () => ({ page: 'library', library: readLibrary(ctx, Question.parse(req.query)) })),
  )
  for (const base of ['/guides/:slug', '/guides/:slug/revisions/:label']) {
    routes.get(base, guidePage('front'))
    routes.get(`${base}/steps`, guidePage('steps'))
    routes.get(`${base}/parts`, guidePage('parts'))
    routes.get(`${base}/models`, guidePage('models'))
    routes.get(`${base}/revisions`, guidePage('revisions'))
    routes.get(`${base}/steps/:number`, async (req, res) => {
      await send(req, res, () => {
        const guide = readGuide(ctx, part(req, 'slug') ?? '', part(req, 'label'))
        const step = part(req, 'number') ?? ''
        const known =
          guide !== undefined &&
          /^[1-9]\d{0,4}$/.test(step) &&
          Number(step) <= numbering(resolve(guide.document)).steps
        return known ? { page: 'step', guide, step: Number(step) } : { page: 'missing' }
      })
    })
  }
  feedRoutes(ctx, routes)
  routes.get(APPLICATION, async (req, res) => {
    res
      .type('html')
      .set('cache-control', 'no-cache')
      .send(await renderer.shell(req.originalUrl))
  })
  return {
    routes,
    serveKept: (req, res) => {
      if (req.method !== 'GET' && req.method !== 'HEAD') return false
      const page = kept.find(keyOf(req))
      if (page === undefined) return false
      answerPacked(req, res, page)
      return true
    },
  }

  /** A page with a picture that is still being worked on, or that is missing, is rendered again the next time. */
  function isLasting(data: PageData): boolean {
    if (data.page === 'missing' || !ctx.config.production) return false
    return data.page === 'library' || data.guide.files.every(({ state }) => state !== 'working')
  }
}

/** What a page depends on: its path, the language, and for the library what was asked. Anything else in an address is not heard. */
function keyOf(req: IncomingMessage): string {
  const [path = '', search] = (req.url ?? '').split('?', 2)
  const asked =
    search !== undefined && path === '/guides'
      ? JSON.stringify(Question.parse(Object.fromEntries(new URLSearchParams(search))))
      : ''
  return `${languageOf(req)} ${path} ${asked}`
}

/**
 * The text at a revision's own address never changes, but the note above it that a newer one is current must come soon: an hour.
 * The latest is asked for each time, which costs 304 where nothing is new.
 */
function cachingOf(data: PageData): string {
  return 'guide' in data && data.guide.pinned ? 'public, max-age=3600' : 'public, max-age=0, must-revalidate'
}

/** The last route of the site: a page that says that there is nothing here. */
export function missingPage(ctx: Context, renderer: Renderer) {
  return async (req: Request, res: Response): Promise<void> => {
    const [render, parts] = await Promise.all([renderer.render(), renderer.parts()])
    const html = render({
      data: { page: 'missing' },
      language: languageOf(req),
      origin: ctx.config.appUrl,
      path: req.path,
      ...parts,
      demo: ctx.config.demo,
    })
    res.status(404).type('html').send(html)
  }
}

function part(req: Request, name: string): string | undefined {
  const value: unknown = (req.params as Record<string, unknown>)[name]
  return typeof value === 'string' ? value : undefined
}

function feedRoutes(ctx: Context, routes: Router): void {
  const icon = readFileSync(path.join(rootDir(), 'src/app/favicon.svg'), 'utf8')
  routes.get('/favicon.svg', (_req, res) => {
    res.type('image/svg+xml').set('cache-control', 'public, max-age=86400').send(icon)
  })
  routes.get('/feed.atom', (_req, res) => {
    res.type('application/atom+xml').send(atomFeed(ctx))
  })
  routes.get('/guides/:slug/feed.atom', (req, res, next) => {
    const feed = atomFeed(ctx, req.params.slug)
    if (feed === undefined) next()
    else res.type('application/atom+xml').send(feed)
  })
  routes.get('/sitemap.xml', (_req, res) => {
    res.type('application/xml').send(sitemap(ctx))
  })
  routes.get('/robots.txt', (_req, res) => {
    const { appUrl } = ctx.config
    res
      .type('text/plain')
      .send(
        `User-agent: *\nDisallow: /api/\nDisallow: /drafts\nDisallow: /account\nSitemap: ${appUrl}/sitemap.xml\n`,
      )
  })
}
