import { once } from 'node:events'
import { Agent, createServer, get, type Server } from 'node:http'
import type { AddressInfo } from 'node:net'
import path from 'node:path'
import { fork } from 'node:child_process'
import { brotliCompressSync, constants } from 'node:zlib'
import type { Browser } from 'playwright-core'
import { openDb } from '../../server/db/open'
import { insertDocument, insertGuide, putDraft } from '../../server/guides/repo'
import { insertRevision } from '../../server/guides/revisionRepo'
import { users } from '../../server/db/schema'
import { openBrowser, RunningSite } from '../e2e/site'
import { fortySteps } from './fortySteps'
import { row, type BenchRow } from './row'
import { HAND_STYLE, staticPage } from './staticPage'

const ADDRESS = '/guides/forty-steps/steps'
const SECONDS = 4
const AT_ONCE = 16

/** The reading page of a guide of 40 steps beside a page of the same text written by hand, and beside a bare Express handler. */
export async function reading(): Promise<BenchRow[]> {
  const site = await RunningSite.start()
  const browser = await openBrowser()
  const hand = await serveByHand()
  try {
    publishForty(site.dataDir)
    return [
      ...(await bytes(site.address, browser)),
      await pagesASecond(site.address),
      await firstText(site.address, hand.address, browser),
    ]
  } finally {
    await browser.close()
    hand.server.close()
    await site.stop()
  }
}

function publishForty(dataDir: string): void {
  const { db, close } = openDb(path.join(dataDir, 'quern.db'))
  const now = new Date()
  const document = fortySteps()
  db.transaction((tx) => {
    const person = {
      id: 'bench',
      name: 'Bench',
      email: 'bench@example.org',
      emailVerified: true,
      createdAt: now,
      updatedAt: now,
    }
    tx.insert(users).values(person).run()
    const documentHash = insertDocument(tx, document, now)
    const guide = { id: 'forty-steps', slug: 'forty-steps', byline: 'Bench', createdAt: now }
    insertGuide(tx, guide, person.id)
    putDraft(tx, { guideId: guide.id, documentHash, version: 1, updatedBy: person.id, updatedAt: now })
    insertRevision(tx, {
      id: 'forty-steps-a',
      guideId: guide.id,
      number: 1,
      label: 'A',
      documentHash,
      changeClass: null,
      note: 'Bench',
      publishedByName: person.name,
      publishedBy: person.id,
      publishedAt: now,
    })
  })
  close()
}

/** What a first visit transfers, as the browser's own network log counts it: without typefaces (which come after the text) and with them. */
async function bytes(address: string, browser: Browser): Promise<BenchRow[]> {
  const page = await browser.newPage()
  const client = await page.context().newCDPSession(page)
  await client.send('Network.enable')
  const kinds = new Map<string, string>()
  const sizes = new Map<string, number>()
  client.on('Network.responseReceived', ({ requestId, response }) => kinds.set(requestId, response.url))
  client.on('Network.loadingFinished', ({ requestId, encodedDataLength }) =>
    sizes.set(requestId, encodedDataLength),
  )
  await page.goto(`${address}${ADDRESS}`, { waitUntil: 'networkidle' })
  await page.close()
  const all = [...sizes].map(([id, size]) => ({ url: kinds.get(id) ?? '', size }))
  const sum = (of: typeof all): number => of.reduce((total, { size }) => total + size, 0)
  const type = /readingFonts|\.woff2?/
  const text = all.filter(({ url }) => !type.test(url) && !url.endsWith('.svg'))
  const packed = brotliCompressSync(staticPage(fortySteps(), 'inside'), {
    params: { [constants.BROTLI_PARAM_QUALITY]: 9 },
  }).length
  return [
    row('40 steps, first visit, text, style and script: bytes transferred', sum(text), packed, 2.5, 'lower'),
    row(
      '40 steps, first visit with the typefaces that come after the text: bytes',
      sum(all),
      packed,
      2.5,
      'lower',
    ),
    row(
      '40 steps, script: bytes (beside its limit)',
      sum(all.filter(({ url }) => url.endsWith('.js'))),
      10 * 1024,
      1,
      'lower',
    ),
    row('40 steps, requests for text, style and script', text.length, 1, 3, 'lower'),
  ]
}

/** Both answer the same bytes unpacked, from processes of their own, to the same client in turn. */
async function pagesASecond(address: string): Promise<BenchRow> {
  const html = await (
    await fetch(`${address}${ADDRESS}`, { headers: { 'accept-encoding': 'identity' } })
  ).text()
  const bare = fork(new URL('./bareExpress.mjs', import.meta.url))
  bare.send(html)
  const [port] = (await once(bare, 'message')) as [number]
  const theirs = `http://localhost:${port}/`
  let [ours, peer] = [0, 0]
  for (let round = 0; round < 3; round += 1) {
    ours += await answersIn(`${address}${ADDRESS}`)
    peer += await answersIn(theirs)
  }
  bare.kill()
  return row(
    '40 steps: pages a second, beside a bare Express handler',
    ours / (3 * SECONDS),
    peer / (3 * SECONDS),
    1.5,
    'higher',
  )
}

async function answersIn(address: string): Promise<number> {
  const agent = new Agent({ keepAlive: true, maxSockets: AT_ONCE })
  const until = Date.now() + SECONDS * 1000
  let count = 0
  const ask = (): Promise<void> =>
    new Promise((resolve, reject) => {
      get(address, { agent, headers: { 'accept-encoding': 'identity' } }, (answer) => {
        answer.on('end', resolve).on('error', reject).resume()
      }).on('error', reject)
    })
  await Promise.all(
    Array.from({ length: AT_ONCE }, async () => {
      while (Date.now() < until) {
        await ask()
        count += 1
      }
    }),
  )
  agent.destroy()
  return count
}

async function serveByHand(): Promise<{ server: Server; address: string }> {
  const pack = (text: string): Buffer => brotliCompressSync(text)
  const [page, style] = [pack(staticPage(fortySteps(), 'beside')), pack(HAND_STYLE)]
  const server = createServer((req, res) => {
    const css = req.url === '/style.css'
    res.writeHead(200, {
      'content-type': css ? 'text/css' : 'text/html; charset=utf-8',
      'content-encoding': 'br',
    })
    res.end(css ? style : page)
  }).listen(0)
  await once(server, 'listening')
  return { server, address: `http://localhost:${(server.address() as AddressInfo).port}/` }
}

/** First text on a phone: CPU four times slower, 150 ms, 1.6 Mbit/s; the middle of five visits each, in turn. */
async function firstText(ours: string, peer: string, browser: Browser): Promise<BenchRow> {
  const times: { ours: number[]; peer: number[] } = { ours: [], peer: [] }
  for (let round = 0; round < 5; round += 1) {
    times.ours.push(await visit(browser, `${ours}${ADDRESS}`))
    times.peer.push(await visit(browser, peer))
  }
  const middle = (of: number[]): number => [...of].sort((a, b) => a - b)[2]!
  return row(
    '40 steps on a phone: first text, ms, beside the page by hand with its own style sheet',
    middle(times.ours),
    middle(times.peer),
    1,
    'lower',
  )
}

async function visit(browser: Browser, address: string): Promise<number> {
  const context = await browser.newContext({ viewport: { width: 390, height: 844 } })
  const page = await context.newPage()
  const client = await context.newCDPSession(page)
  await client.send('Emulation.setCPUThrottlingRate', { rate: 4 })
  await client.send('Network.enable')
  const rate = (1.6 * 1024 * 1024) / 8
  await client.send('Network.emulateNetworkConditions', {
    offline: false,
    latency: 150,
    downloadThroughput: rate,
    uploadThroughput: rate,
  })
  await page.goto(address, { waitUntil: 'load' })
  const time = await page.evaluate(
    () =>
      new Promise<number>((resolve) => {
        new PerformanceObserver((list) => {
          const found = list.getEntriesByName('first-contentful-paint')[0]
          if (found !== undefined) resolve(found.startTime)
        }).observe({ type: 'paint', buffered: true })
      }),
  )
  await context.close()
  return time
}
