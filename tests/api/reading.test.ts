import { createServer } from 'node:http'
import { Router } from 'express'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { putSearch, insertRevision } from '../../server/guides/revisionRepo'
import { insertDocument, insertGuide, putDraft } from '../../server/guides/repo'
import { createPages, type Pages } from '../../server/pages/pages'
import { emptyDocument } from '../../shared/guide/emptyDocument'
import type { GuideDocument } from '../../shared/guide/schema'
import { TestSite } from './testSite'

/** Invented guides, each in a script of its own. */
const TITLES = {
  pump: 'Hand pump <script>alert(1)</script> & well',
  arabic: 'مضخة يدوية للبئر',
  chinese: '手动水泵制作指南',
  swahili: 'Pampu ya mkono ya kisima',
}

let site: TestSite

function publish(slug: string, document: GuideDocument, label = 'A', number = 1): void {
  const { ctx } = site
  const at = new Date(Date.UTC(2026, 0, number))
  ctx.db.transaction((tx) => {
    const documentHash = insertDocument(tx, document, at)
    if (number === 1) {
      insertGuide(tx, { id: slug, slug, byline: 'Test Workshop', createdAt: at }, owner)
      putDraft(tx, { guideId: slug, documentHash, version: 1, updatedBy: owner, updatedAt: at })
    }
    insertRevision(tx, {
      id: `${slug}-${label}`,
      guideId: slug,
      number,
      label,
      documentHash,
      changeClass: null,
      note: 'Invented for a test.',
      publishedByName: 'Test',
      publishedBy: owner,
      publishedAt: at,
    })
    putSearch(tx, slug, document)
  })
}

function guide(title: string, lang: string): GuideDocument {
  const doc = emptyDocument(site.ctx.newId, { lang, title, machine: 'pump', sectionTitle: 'One' })
  return { ...doc, summary: `About: ${title}`, licence: 'CC-BY-SA-4.0' }
}

let owner = ''
const get = (address: string, headers: Record<string, string> = {}): Promise<Response> =>
  fetch(`${site.address}${address}`, { headers, redirect: 'manual' })

/** Needs `vite build --app`, which `npm test` runs first. */
describe('reading pages of the built site', () => {
  beforeAll(async () => {
    const made: { pages?: Pages } = {}
    const router = Router()
    router.use((req, res, next) => made.pages!.router(req, res, next))
    site = await TestSite.start({
      pages: () => ({
        router,
        serveKept: (req, res) => made.pages!.serveKept(req, res),
        close: async () => made.pages?.close(),
      }),
    })
    made.pages = await createPages(site.ctx, createServer())
    owner = site.person().id
    publish('hand-pump', guide(TITLES.pump, 'en'))
    publish('arabic-pump', guide(TITLES.arabic, 'ar'))
    publish('chinese-pump', guide(TITLES.chinese, 'zh'))
    publish('swahili-pump', guide(TITLES.swahili, 'sw'))
  })
  afterAll(() => site.close())

  test('a title with markup is text, in the page, its head and its structured data', async () => {
    const html = await (await get('/guides/hand-pump')).text()
    expect(html).not.toContain('<script>alert')
    expect(html).toContain('Hand pump &lt;script&gt;')
    const data = /<script type="application\/ld\+json">(.*?)<\/script>/s.exec(html)?.[1]
    expect((JSON.parse(data ?? '{}') as { name: string }).name).toBe(TITLES.pump)
  })

  test.each([
    ['pump', 'hand-pump'],
    ['WELL han', 'hand-pump'],
    ['يدوية', 'arabic-pump'],
    ['水泵', 'chinese-pump'],
    ['mkono', 'swahili-pump'],
  ])('the library finds "%s"', async (asked, slug) => {
    const html = await (await get(`/guides?q=${encodeURIComponent(asked)}`)).text()
    expect(html).toContain(`href="/guides/${slug}"`)
    const others = ['hand-pump', 'arabic-pump', 'chinese-pump', 'swahili-pump'].filter(
      (each) => each !== slug,
    )
    for (const other of others) expect(html).not.toContain(`href="/guides/${other}"`)
  })

  test.each(['"', '* NEAR(', 'a AND', "'; drop table guide;", '😀', '\u0000'])(
    'asking for %j never fails',
    async (asked) => {
      expect((await get(`/guides?q=${encodeURIComponent(asked)}`)).status).toBe(200)
    },
  )

  test('language and direction follow the address, the cookie and what the browser asks for', async () => {
    const page = async (address: string, headers = {}): Promise<string> =>
      (await get(address, headers)).text()
    expect(await page('/guides?lang=ar')).toContain('<html lang="ar" dir="rtl">')
    expect(await page('/guides', { cookie: 'quern_language=ar' })).toContain('dir="rtl"')
    expect(await page('/guides', { 'accept-language': 'fr, ar;q=0.8, en;q=0.5' })).toContain('dir="rtl"')
    expect(await page('/guides', { 'accept-language': 'fr' })).toContain('<html lang="en" dir="ltr">')
    expect(await page('/guides/arabic-pump')).toMatch(/<h1[^>]*lang="ar" dir="rtl"/)
  })

  test('a kept page is the page, in every packing, and 304 for who has it', async () => {
    const fresh = await (await get('/guides/hand-pump', { 'accept-encoding': 'identity' })).text()
    const kept = await get('/guides/hand-pump', { 'accept-encoding': 'gzip' })
    expect(kept.headers.get('content-encoding')).toBe('gzip')
    expect(await kept.text()).toBe(fresh)
    expect(kept.headers.get('content-security-policy')).toContain("script-src 'self'")
    const again = await get('/guides/hand-pump', {
      'accept-encoding': 'gzip',
      'if-none-match': kept.headers.get('etag') ?? '',
    })
    expect(again.status).toBe(304)
  })

  test('a new revision shows at once, the old one keeps its address and says so', async () => {
    await (await get('/guides/swahili-pump')).text()
    publish('swahili-pump', { ...guide('Pampu mpya', 'sw') }, 'B', 2)
    expect(await (await get('/guides/swahili-pump')).text()).toContain('Pampu mpya')
    const old = await (await get('/guides/swahili-pump/revisions/A')).text()
    expect(old).toContain(TITLES.swahili)
    expect(old).toContain('Revision B is current')
  })

  test('what is not there is a page that says so, with 404; a draft is not there', async () => {
    for (const address of [
      '/guides/nothing',
      '/guides/hand-pump/steps/99',
      '/guides/hand-pump/revisions/Z',
      '/nowhere',
    ]) {
      const answer = await get(address)
      expect(answer.status, address).toBe(404)
      expect(await answer.text(), address).toContain('href="/guides"')
    }
  })

  test('feeds and the sitemap are well formed and name the guides', async () => {
    const feed = await (await get('/feed.atom')).text()
    expect(feed).toContain('xmlns="http://www.w3.org/2005/Atom"')
    expect(feed).toContain('Hand pump &lt;script&gt;')
    expect(await (await get('/sitemap.xml')).text()).toContain('/guides/hand-pump</loc>')
    expect((await get('/guides/hand-pump/feed.atom')).headers.get('content-type')).toContain('atom+xml')
  })

  test('each page has one heading of the first level and no id twice', async () => {
    for (const address of [
      '/guides',
      '/guides/hand-pump',
      '/guides/hand-pump/steps',
      '/guides/hand-pump/steps/1',
      '/guides/hand-pump/parts',
    ]) {
      const html = await (await get(address)).text()
      expect(html.match(/<h1/g), address).toHaveLength(1)
      const ids = [...html.matchAll(/\sid="([^"]+)"/g)].map(([, id]) => id)
      expect(new Set(ids).size, address).toBe(ids.length)
    }
  })
})
