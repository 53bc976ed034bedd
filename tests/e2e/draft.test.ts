import { AxeBuilder } from '@axe-core/playwright'
import type { Browser, BrowserContext, Page } from 'playwright-core'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { openBrowser, RunningSite } from './site'

let site: RunningSite
let browser: Browser
let guideId: string

/** Signs up, confirms by the mail, and is signed in after it. */
async function newPerson(name: string, email: string): Promise<BrowserContext> {
  const context = await browser.newContext({ viewport: { width: 1280, height: 900 }, baseURL: site.address })
  const ask = async (path: string, data: object): Promise<void> => {
    const answer = await context.request.post(path, { data, headers: { origin: site.address } })
    expect(answer.ok(), await answer.text()).toBe(true)
  }
  await ask('/api/accounts', { name, email, password: 'a long enough pass phrase', language: 'en' })
  const token = /[?&#]token=([^\s&"<>]+)/.exec(await site.mailTo(email))?.[1]
  await ask('/api/accounts/confirmed', { token })
  return context
}

const title = (page: Page) => page.getByRole('textbox', { name: 'Title of the step' })
const kept = (page: Page) => page.locator('[data-save="kept"]').waitFor()
const outline = (page: Page) => page.getByRole('navigation', { name: 'Outline' })
const rows = async (page: Page): Promise<string[]> =>
  (await outline(page).locator('li.outline-row a span').allInnerTexts()).map((text) => text.trim())

async function openStep(page: Page, name: string): Promise<void> {
  await outline(page).getByRole('link', { name }).click()
  await expect.poll(() => title(page).inputValue()).toBe(name)
}

/** The draft as the site has it, asked for anew. */
async function onSite(context: BrowserContext): Promise<string> {
  return (await context.request.get(`/api/guides/${guideId}/draft`)).text()
}

let ines: BrowserContext
let page: Page

beforeAll(async () => {
  site = await RunningSite.start()
  browser = await openBrowser()
  ines = await newPerson('Ines Harrow', 'ines@example.org')
  page = await ines.newPage()
})
afterAll(async () => {
  await browser.close()
  await site.stop()
})

describe('drafting', () => {
  test('a guide is started, and what is written is kept', async () => {
    await page.goto('/drafts')
    await page.getByRole('button', { name: 'Start a guide' }).click()
    await page.getByRole('textbox', { name: 'Title' }).fill('Treadle grinder')
    await page.getByRole('button', { name: 'Start', exact: true }).click()
    await title(page).fill('Cut the frame')
    await kept(page)
    guideId = page.url().split('/')[4]!
    expect(await page.title()).toContain('Cut the frame')
    expect(await onSite(ines)).toContain('Cut the frame')
  })

  test('steps are added, moved by keyboard and by dragging, removed, and brought back', async () => {
    for (const name of ['Weld the frame', 'Fit the treadle']) {
      await page.getByRole('button', { name: 'Add a step', exact: true }).click()
      await page.waitForFunction(() => document.activeElement?.closest('[data-field="title"]') !== null)
      await page.keyboard.type(name)
    }
    expect(await rows(page)).toEqual(['Cut the frame', 'Weld the frame', 'Fit the treadle'])
    await outline(page).getByRole('link', { name: 'Fit the treadle' }).focus()
    await page.keyboard.press('Alt+ArrowUp')
    expect(await rows(page)).toEqual(['Cut the frame', 'Fit the treadle', 'Weld the frame'])
    const from = outline(page).locator('.outline-row', { hasText: 'Weld the frame' })
    await from.hover()
    const grip = (await from.locator('.grip').boundingBox())!
    const to = (await outline(page).locator('.outline-row', { hasText: 'Cut the frame' }).boundingBox())!
    await page.mouse.move(grip.x + 8, grip.y + 8)
    await page.mouse.down()
    await page.mouse.move(to.x + 40, to.y + to.height - 4, { steps: 10 })
    await page.mouse.move(to.x + 40, to.y + 4, { steps: 5 })
    await page.mouse.up()
    await expect.poll(() => rows(page)).toEqual(['Weld the frame', 'Cut the frame', 'Fit the treadle'])
    await page.getByRole('button', { name: /^Acts on Step 2/ }).click()
    await page.getByRole('menuitem', { name: 'Remove' }).click()
    await expect.poll(() => rows(page)).toEqual(['Weld the frame', 'Fit the treadle'])
    await page.keyboard.press('Control+z')
    await expect.poll(() => rows(page)).toEqual(['Weld the frame', 'Cut the frame', 'Fit the treadle'])
  })

  test('undo and redo by keyboard go through fields, also within a text field', async () => {
    await openStep(page, 'Cut the frame')
    await title(page).fill('Cut the frame to size')
    await page.keyboard.press('Control+z')
    await expect.poll(() => title(page).inputValue()).toBe('Cut the frame')
    await page.keyboard.press('Control+Shift+z')
    await expect.poll(() => title(page).inputValue()).toBe('Cut the frame to size')
    await kept(page)
  })

  test('a part is taken in hand by its name and becomes a line of the parts list', async () => {
    const add = page.getByRole('combobox', { name: 'Add a part' })
    await add.fill('Square tube 25')
    await page.getByRole('option', { name: /New line/ }).click()
    await page.getByRole('textbox', { name: 'Quantity of Square tube 25 here' }).fill('4')
    await expect.poll(() => page.locator('.ledger.use').innerText()).toContain('4 used, 1 listed')
    await page.getByRole('complementary', { name: 'Readiness' }).getByRole('button', { name: /4/ }).click()
    await expect.poll(() => page.locator('.ledger.use').innerText()).toContain('4 of 4 used')
    await kept(page)
  })

  test('without network everything stays on the device, survives a reload, and is sent afterwards', async () => {
    await ines.route('**/api/guides/*/draft', (route) =>
      route.request().method() === 'PUT' ? route.abort('internetdisconnected') : route.continue(),
    )
    await title(page).fill('Cut the frame from square tube')
    await page.locator('[data-save="no network"]').waitFor()
    await page.waitForTimeout(700)
    await page.reload()
    await expect.poll(() => title(page).inputValue()).toBe('Cut the frame from square tube')
    expect(await onSite(ines)).not.toContain('square tube"')
    await ines.unroute('**/api/guides/*/draft')
    await kept(page)
    await expect.poll(() => onSite(ines)).toContain('Cut the frame from square tube')
    expect(await page.locator('.conflicts').count()).toBe(0)
  })

  test('two pages at once: different steps combine, one field keeps both versions until one is chosen', async () => {
    const other = await ines.newPage()
    await other.goto(page.url())
    await openStep(other, 'Fit the treadle')
    await title(other).fill('Fit the treadle and its rod')
    await title(page).fill('Cut the frame with a saw')
    await kept(other)
    await kept(page)
    await expect.poll(() => rows(page), { timeout: 15_000 }).toContain('Fit the treadle and its rod')
    await openStep(other, 'Cut the frame with a saw')
    await Promise.all([title(other).fill('Version one'), title(page).fill('Version two')])
    await expect
      .poll(
        async () => (await page.locator('.conflicts').count()) + (await other.locator('.conflicts').count()),
        {
          timeout: 15_000,
        },
      )
      .toBeGreaterThan(0)
    const both = await onSite(ines)
    expect(both).toContain('Version one')
    expect(both).toContain('Version two')
    const where = (await page.locator('.conflicts').count()) > 0 ? page : other
    await where.getByRole('button', { name: /^Take this one instead/ }).click()
    await expect.poll(() => where.locator('.conflicts').count()).toBe(0)
    await other.close()
  })

  test.each([
    ['light', {}],
    ['dark', { colorScheme: 'dark' }],
    ['right to left', { language: 'ar' }],
    ['on a phone', { viewport: { width: 390, height: 844 } }],
  ] as const)('no page has an accessibility fault: %s', async (_name, look) => {
    const { language = 'en', ...options } = { ...look } as { language?: string }
    const context = await browser.newContext({
      baseURL: site.address,
      storageState: await ines.storageState(),
      ...options,
    })
    await context.addCookies([{ name: 'quern_language', value: language, url: site.address }])
    const seen = await context.newPage()
    const step = new URL(page.url()).pathname
    for (const path of [
      '/drafts',
      step,
      `/drafts/${guideId}/guide`,
      `/drafts/${guideId}/parts`,
      `/drafts/${guideId}/publish`,
    ]) {
      await seen.goto(path)
      await seen.locator('h1').first().waitFor()
      const { violations } = await new AxeBuilder({ page: seen }).analyze()
      expect(violations.map(({ id, nodes }) => `${path} ${id}: ${nodes[0]?.html ?? ''}`)).toEqual([])
      expect(
        await seen.evaluate(() => document.documentElement.scrollWidth - innerWidth),
      ).toBeLessThanOrEqual(0)
    }
    await context.close()
  })
})
