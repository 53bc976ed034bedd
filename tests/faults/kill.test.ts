import { createHash } from 'node:crypto'
import { readFileSync } from 'node:fs'
import { request, type ClientRequest } from 'node:http'
import path from 'node:path'
import { setTimeout as wait } from 'node:timers/promises'
import sharp from 'sharp'
import { afterEach, expect, test } from 'vitest'
import { Draft } from '../../shared/api/drafts'
import { FilesAnswer, UploadAnswer } from '../../shared/api/files'
import { GuideEntry } from '../../shared/api/guides'
import type { GuideDocument } from '../../shared/guide/schema'
import { hashOf } from '../../shared/lib/json/hash'
import { readyDocument } from '../api/readyDocument'
import { ServerProcess } from './serverProcess'

let server: ServerProcess | undefined
afterEach(async () => {
  await server?.stop()
  server = undefined
})

/** Whatever was killed: every stored file has the hash that it is named by, every row has its file, nothing is half finished. */
function expectWhole(site: ServerProcess): void {
  for (const file of site.stored()) {
    expect(createHash('sha256').update(readFileSync(file)).digest('hex')).toBe(path.basename(file))
  }
  const names = new Set(site.stored().map((file) => path.basename(file)))
  const rows = site.rows<{ hash: string }>(
    'select sha256 as hash from asset union select file from rendition',
  )
  expect(rows.filter(({ hash }) => !names.has(hash))).toEqual([])
  expect(site.rows('pragma integrity_check')).toEqual([{ integrity_check: 'ok' }])
  expect(site.rows('pragma foreign_key_check')).toEqual([])
}

function startUpload(site: ServerProcess, bytes: number): ClientRequest {
  const sending = request({
    host: '127.0.0.1',
    port: site.port,
    method: 'POST',
    path: '/api/files',
    headers: {
      cookie: site.person.cookie,
      'content-type': 'multipart/form-data; boundary=x',
      'content-length': bytes,
    },
  })
  // The server is killed under it.
  sending.on('error', () => undefined)
  sending.write('--x\r\nContent-Disposition: form-data; name="files"; filename="a.stl"\r\n\r\n')
  sending.write(Buffer.alloc(bytes / 2, 7))
  return sending
}

test('killed in the middle of an upload: nothing of it is there, and it can be brought again', async () => {
  server = await ServerProcess.start()
  startUpload(server, 4_000_000)
  for (let tries = 0; server.temporary().length === 0 && tries < 200; tries += 1) await wait(10)
  expect(server.temporary()).toHaveLength(1)
  await server.kill()
  await server.boot()
  expect(server.temporary()).toEqual([])
  expect(server.stored()).toEqual([])
  expect(server.rows('select * from asset')).toEqual([])
  const bytes = new Uint8Array(
    await sharp({ create: { width: 20, height: 20, channels: 3, background: '#abc' } })
      .png()
      .toBuffer(),
  )
  const answer = await server.client.upload('/api/files', [{ name: 'a.png', bytes }])
  expect(answer.read(UploadAnswer).files).toHaveLength(1)
})

test('killed while it works on pictures: the jobs go on after the start', async () => {
  server = await ServerProcess.start()
  const noise = { type: 'gaussian', mean: 128, sigma: 40 } as const
  const files = await Promise.all(
    [700, 800, 900, 1000].map(async (width) => ({
      name: `${width}.jpg`,
      bytes: new Uint8Array(
        await sharp({ create: { width, height: 700, channels: 3, background: '#000', noise } })
          .jpeg()
          .toBuffer(),
      ),
    })),
  )
  const { files: brought } = (await server.client.upload('/api/files', files)).read(UploadAnswer)
  await server.kill()
  expectWhole(server)
  expect(server.rows(`select id from job where state in ('waiting', 'running')`).length).toBeGreaterThan(0)
  await server.boot()
  const hashes = brought.map(({ sha256 }) => sha256).join(',')
  let states: string[] = []
  for (
    let tries = 0;
    tries < 1200 && !(states.length === 4 && states.every((state) => state === 'ready'));
    tries += 1
  ) {
    const answer = await server.client.get(`/api/files?sha256=${hashes}`)
    states = answer.read(FilesAnswer).files.map((file) => file.state)
    await wait(50)
  }
  expect(states).toEqual(['ready', 'ready', 'ready', 'ready'])
  expectWhole(server)
}, 120_000)

test('killed in the middle of saves, at four moments: each time the old state or the new one, and none that was answered is lost', async () => {
  server = await ServerProcess.start()
  const { id } = (await server.client.post('/api/guides', { title: 'Pump', lang: 'en' })).read(GuideEntry)
  let count = 0
  for (let round = 0; round < 4; round += 1) {
    const before = (await server.client.get(`/api/guides/${id}/draft`)).read(Draft)
    const known = new Map([[before.version, hashOf(before.document)]])
    let answered = before.version
    const saving = (async (): Promise<void> => {
      let version = before.version
      for (;;) {
        const document: GuideDocument = {
          ...readyDocument(`Pump ${(count += 1)}`),
          summary: 'x'.repeat(4000),
        }
        known.set(version + 1, hashOf(document))
        const answer = await server!.client.put(
          `/api/guides/${id}/draft`,
          { document },
          { 'if-match': `"${version}"` },
        )
        if (answer.status !== 200) throw new Error(answer.text)
        version += 1
        answered = version
      }
    })()
    const ended = expect(saving).rejects.toThrow('fetch failed')
    await wait(20 + round * 31)
    await server.kill()
    await ended
    await server.boot()
    const after = (await server.client.get(`/api/guides/${id}/draft`)).read(Draft)
    expect(after.version).toBeGreaterThanOrEqual(answered)
    expect(known.get(after.version)).toBe(hashOf(after.document))
    const [state] = server.rows<{ most: number }>('select max(version) as most from draft_state')
    expect(state!.most).toBe(after.version)
  }
  expectWhole(server)
}, 120_000)

test('SIGTERM finishes what is in hand', async () => {
  server = await ServerProcess.start()
  const bytes = new Uint8Array(
    await sharp({ create: { width: 900, height: 700, channels: 3, background: '#abc' } })
      .png()
      .toBuffer(),
  )
  const { files } = (await server.client.upload('/api/files', [{ name: 'a.png', bytes }])).read(UploadAnswer)
  for (
    let tries = 0;
    tries < 100 && server.rows(`select id from job where state = 'running'`).length === 0;
    tries += 1
  )
    await wait(5)
  expect(await server.end('SIGTERM')).toBe(0)
  expect(server.rows(`select id from job where state = 'running'`)).toEqual([])
  expect(server.rows(`select state from asset where sha256 = '${files[0]!.sha256}'`)).toEqual([
    { state: 'ready' },
  ])
  expectWhole(server)
})
