import type { Browser } from 'playwright-core'

/** A cheap phone on a slow line. */
const PHONE = { cpu: 4, latencyMs: 150, bitsPerSecond: 1_600_000, width: 390, height: 844 }

export interface Loaded {
  /** Milliseconds from the start of the load until the first text was painted. */
  firstTextMs: number
  /** Bytes on the line with their headers, pictures left out. */
  bytes: number
  requests: number
  scriptBytes: number
  fontBytes: number
}

/** Loads a page as on a cheap phone with nothing kept from before, and waits until the line is quiet. */
export async function loadOnPhone(browser: Browser, address: string, slow = true): Promise<Loaded> {
  const context = await browser.newContext({
    viewport: { width: PHONE.width, height: PHONE.height },
    locale: 'en-GB',
  })
  const page = await context.newPage()
  const cdp = await context.newCDPSession(page)
  await cdp.send('Network.enable')
  if (slow) {
    await cdp.send('Emulation.setCPUThrottlingRate', { rate: PHONE.cpu })
    await cdp.send('Network.emulateNetworkConditions', {
      offline: false,
      latency: PHONE.latencyMs,
      downloadThroughput: PHONE.bitsPerSecond / 8,
      uploadThroughput: PHONE.bitsPerSecond / 8,
    })
  }
  const kinds = new Map<string, string>()
  const loaded: Loaded = { firstTextMs: 0, bytes: 0, requests: 0, scriptBytes: 0, fontBytes: 0 }
  cdp.on('Network.responseReceived', ({ requestId, type }) => kinds.set(requestId, type))
  cdp.on('Network.loadingFinished', ({ requestId, encodedDataLength }) => {
    const kind = kinds.get(requestId)
    if (kind === 'Image' || kind === undefined) return
    loaded.requests += 1
    loaded.bytes += encodedDataLength
    if (kind === 'Script') loaded.scriptBytes += encodedDataLength
    if (kind === 'Font') loaded.fontBytes += encodedDataLength
  })
  await page.goto(address, { waitUntil: 'networkidle' })
  loaded.firstTextMs = await page.evaluate(
    () => performance.getEntriesByName('first-contentful-paint')[0]?.startTime ?? Number.NaN,
  )
  await context.close()
  return loaded
}

/** The middle one of several loads, each with a browser that has kept nothing. */
export async function firstText(browser: Browser, address: string, times: number): Promise<Loaded> {
  const loads: Loaded[] = []
  for (let i = 0; i < times; i += 1) loads.push(await loadOnPhone(browser, address))
  return loads.sort((a, b) => a.firstTextMs - b.firstTextMs)[Math.floor(times / 2)]!
}
