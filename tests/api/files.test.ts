import { existsSync, readdirSync, readFileSync } from 'node:fs'
import { request } from 'node:http'
import path from 'node:path'
import { setTimeout as wait } from 'node:timers/promises'
import sharp from 'sharp'
import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { FilesAnswer, UploadAnswer, type FileEntry } from '../../shared/api/files'
import { assets } from '../../server/db/schema'
import { binaryStl, cubeStl } from './stl'
import { createTestSite, type Answer, type FileToSend, type TestPerson, type TestSite } from './testSite'

const root = path.resolve(import.meta.dirname, '../..')
let site: TestSite
let person: TestPerson
beforeAll(async () => {
  site = await createTestSite()
  person = site.person()
})
afterAll(() => site.close())

const bring = (...files: FileToSend[]): Promise<Answer> => site.as(person).upload('/api/files', files)
const taken = async (...files: FileToSend[]): Promise<FileEntry> =>
  (await bring(...files)).read(UploadAnswer).files[0]!
const look = async (sha256: string): Promise<FileEntry> =>
  (await site.as(person).get(`/api/files?sha256=${sha256}`)).read(FilesAnswer).files[0]!
const temporary = (): string[] => readdirSync(site.ctx.storage.temporaryDir)

async function picture(width: number, height: number, colour: string): Promise<Uint8Array<ArrayBuffer>> {
  const made = sharp({ create: { width, height, channels: 3, background: colour } })
  return new Uint8Array(await made.jpeg().toBuffer())
}

describe('pictures', () => {
  test('WebP first, then AVIF, never enlarged; the same file twice is one', async () => {
    const bytes = await picture(1200, 800, '#875')
    const entry = await taken({ name: 'the bench.jpg', bytes })
    expect(entry).toMatchObject({
      kind: 'picture',
      mediaType: 'image/jpeg',
      name: 'the bench.jpg',
      state: 'working',
    })
    expect(entry).toMatchObject({ picture: null, renditions: [], bytes: bytes.length })
    const again = (await bring({ name: 'again.jpg', bytes }, { name: 'and again.jpg', bytes })).read(
      UploadAnswer,
    )
    expect(again.files.map((file) => [file.sha256, file.name])).toEqual([[entry.sha256, 'the bench.jpg']])
    await site.drain()
    const ready = await look(entry.sha256)
    expect(ready).toMatchObject({ state: 'ready', picture: { width: 1200, height: 800 } })
    expect(ready.renditions.map(({ name, width, height }) => [name, width, height])).toEqual([
      ['avif-1600', 1200, 800],
      ['avif-960', 960, 640],
      ['webp-1600', 1200, 800],
      ['webp-480', 480, 320],
      ['webp-960', 960, 640],
    ])
    expect(
      site.ctx.db
        .select()
        .from(assets)
        .all()
        .filter((row) => row.sha256 === entry.sha256),
    ).toHaveLength(1)
    expect(temporary()).toEqual([])
  })

  test('renditions have lasting addresses, the picture as it was brought in has none', async () => {
    const entry = await taken({ name: 'a.jpg', bytes: await picture(600, 400, '#123') })
    await site.drain()
    const reader = site.as(null)
    const at = `/files/${entry.sha256}`
    const served = await reader.get(`${at}/webp-480`)
    expect(served.status).toBe(200)
    expect(served.headers.get('content-type')).toBe('image/webp')
    expect(served.headers.get('cache-control')).toBe('public, max-age=31536000, immutable')
    expect(served.headers.get('x-content-type-options')).toBe('nosniff')
    expect(Number(served.headers.get('content-length'))).toBe(served.bytes.length)
    expect((await sharp(served.bytes).metadata()).width).toBe(480)
    expect((await reader.get(`${at}/webp-480`, { 'if-none-match': served.etag })).status).toBe(304)
    for (const nothing of [
      at,
      `${at}/original`,
      `${at}/..%2f..%2fsecret`,
      '/files/abc',
      '/files/abc/webp-480',
    ]) {
      expect((await reader.get(nothing)).problem().kind).toBe('not-found')
    }
  })

  const tagged = '/work/shared/checks/data/gps-photo.jpg'
  const reference = [tagged, path.resolve(root, '../shared/checks/data/gps-photo.jpg')].find(existsSync)
  // Source: gps-photo.jpg of the project's check values: position, serial number and names in EXIF, XMP and IPTC, orientation 6.
  test.skipIf(reference === undefined)(
    'nothing of a photo’s metadata is in any served byte, and it is upright',
    async () => {
      const bytes = new Uint8Array(readFileSync(reference!))
      const before = await sharp(bytes).metadata()
      expect(before.exif).toBeDefined()
      expect(before.orientation).toBe(6)
      const entry = await taken({ name: 'photo.jpg', bytes })
      await site.drain()
      const ready = await look(entry.sha256)
      expect(ready.picture).toEqual({ width: before.height, height: before.width })
      const words = [
        'private note',
        'Testcam',
        'Model One',
        'GPS',
        'Exif',
        'http://ns.adobe.com',
        'Photoshop',
        'IPTC',
      ]
      for (const { name } of ready.renditions) {
        const served = await site.as(null).get(`/files/${entry.sha256}/${name}`)
        const { exif, xmp, iptc, icc, orientation, width, height } = await sharp(served.bytes).metadata()
        expect({ name, exif, xmp, iptc, icc, orientation }).toEqual({ name })
        expect(height).toBeGreaterThan(width)
        const text = Buffer.from(served.bytes).toString('latin1')
        for (const word of words) expect(text.includes(word), `${word} in ${name}`).toBe(false)
      }
      // Upright: the corner that was stored lower left stands upper left after a quarter turn to the right.
      const upright = await sharp(bytes)
        .rotate(90, {})
        .resize(16, 16, { fit: 'fill' })
        .removeAlpha()
        .raw()
        .toBuffer()
      const webp = await site.as(null).get(`/files/${entry.sha256}/webp-480`)
      const served = await sharp(webp.bytes).resize(16, 16, { fit: 'fill' }).removeAlpha().raw().toBuffer()
      const mean = upright.reduce((sum, value, at) => sum + Math.abs(value - served[at]!), 0) / upright.length
      expect(mean).toBeLessThan(12)
    },
  )

  test('one that is damaged in the middle is said to be, and may be brought again', async () => {
    const whole = await sharp({
      create: {
        width: 800,
        height: 800,
        channels: 3,
        noise: { type: 'gaussian', mean: 120, sigma: 60 },
        background: '#000',
      },
    })
      .jpeg()
      .toBuffer()
    const entry = await taken({
      name: 'half.jpg',
      bytes: new Uint8Array(whole.subarray(0, whole.length / 2)),
    })
    await site.drain()
    expect(await look(entry.sha256)).toMatchObject({ state: 'failed', picture: null, renditions: [] })
    expect((await look(entry.sha256)).trouble).toContain('damaged')
  })
})

describe('models', () => {
  test('measured, with a preview, a still that runs nothing, and a download under its name', async () => {
    const bytes = cubeStl(10)
    const entry = await taken({ name: 'Läufer “C”/../runner C.stl', bytes })
    expect(entry).toMatchObject({
      kind: 'model',
      mediaType: 'model/stl',
      name: 'runner C.stl',
      state: 'working',
    })
    await site.drain()
    const ready = await look(entry.sha256)
    expect(ready).toMatchObject({
      state: 'ready',
      model: { triangles: 12, closed: true, box: { x: 10, y: 10, z: 10 } },
    })
    expect(ready.model!.volume).toBeCloseTo(1000, 6)
    expect(ready.renditions.map(({ name }) => name)).toEqual(['glb', 'still', 'still-png'])
    const reader = site.as(null)
    const model = await reader.get(`/files/${entry.sha256}`)
    expect(Buffer.from(model.bytes).equals(Buffer.from(bytes))).toBe(true)
    expect(model.headers.get('content-type')).toBe('model/stl')
    expect(model.headers.get('content-disposition')).toBe('attachment; filename="runner C.stl"')
    const still = await reader.get(`/files/${entry.sha256}/still`)
    expect(still.headers.get('content-type')).toBe('image/svg+xml')
    expect(still.headers.get('content-security-policy')).toBe(
      "default-src 'none'; style-src 'unsafe-inline'; sandbox",
    )
    expect((await reader.get(`/files/${entry.sha256}/glb`)).headers.get('content-type')).toBe(
      'model/gltf-binary',
    )
  })

  test('a text STL is known by its content, whatever it is called', async () => {
    const text =
      'solid one\nfacet normal 0 0 1\nouter loop\nvertex 0 0 0\nvertex 1 0 0\nvertex 0 1 0\nendloop\nendfacet\nendsolid one\n'
    expect((await taken({ name: 'part', bytes: text })).kind).toBe('model')
  })

  test('a text STL that breaks off is said to', async () => {
    const entry = await taken({
      name: 'cut.stl',
      bytes: 'solid one\nfacet normal 0 0 1\nouter loop\nvertex 0 0',
    })
    await site.drain()
    expect(await look(entry.sha256)).toMatchObject({ state: 'failed', model: null })
    expect((await look(entry.sha256)).trouble).toMatch(/\w.*\.$/)
  })
})

/** A PNG of one bit a pixel, of which only the head is true: it promises a hundred times what may be decoded. */
function bomb(): Uint8Array<ArrayBuffer> {
  const head = Buffer.from('89504e470d0a1a0a0000000d49484452', 'hex')
  const size = Buffer.alloc(8)
  size.writeUInt32BE(100_000, 0)
  size.writeUInt32BE(100_000, 4)
  const ihdr = Buffer.concat([Buffer.from('IHDR'), size, Buffer.from([1, 0, 0, 0, 0])])
  const crc = Buffer.alloc(4)
  crc.writeUInt32BE(crc32(ihdr), 0)
  const idat = Buffer.from('0000000049444154', 'hex')
  return new Uint8Array(Buffer.concat([head.subarray(0, 12), ihdr, crc, idat, Buffer.alloc(64)]))
}
function crc32(bytes: Buffer): number {
  let crc = 0xffffffff
  for (const byte of bytes) {
    crc ^= byte
    for (let bit = 0; bit < 8; bit += 1) crc = (crc >>> 1) ^ (crc & 1 ? 0xedb88320 : 0)
  }
  return (crc ^ 0xffffffff) >>> 0
}

describe('what is refused, each with a sentence, and nothing half stored', () => {
  const elf = new Uint8Array(readFileSync(process.execPath).subarray(0, 20_000))
  const cases: [string, () => FileToSend, RegExp][] = [
    ['an executable named .jpg', () => ({ name: 'photo.jpg', bytes: elf }), /ELF file by its content/],
    ['an executable named .stl', () => ({ name: 'part.stl', bytes: elf }), /ELF file by its content/],
    [
      'an SVG with a script',
      () => ({
        name: 'a.svg',
        bytes: '<svg xmlns="http://www.w3.org/2000/svg"><script>alert(1)</script></svg>',
      }),
      /SVG is not taken, since it can carry scripts\. Bring PNG, JPEG or WebP/,
    ],
    [
      'an SVG named .png with a prologue',
      () => ({ name: 'a.png', bytes: '<?xml version="1.0"?>\n<!-- x -->\n<svg width="1" height="1"/>' }),
      /SVG is not taken/,
    ],
    [
      'a truncated STL',
      () => ({ name: 'part.stl', bytes: binaryStl(70, 100) }),
      /promises 100 facets and holds 70/,
    ],
    ['an STL without facets', () => ({ name: 'part.stl', bytes: binaryStl(0) }), /no facets/],
    [
      'a text named .stl',
      () => ({ name: 'part.stl', bytes: 'Dear printer, please print this part for me.'.repeat(9) }),
      /not an STL/,
    ],
    [
      'chance bytes named .stl',
      () => ({ name: 'part.stl', bytes: Uint8Array.from({ length: 4000 }, (_, at) => (at * 7919) % 251) }),
      /not an STL/,
    ],
    ['a picture bomb', () => ({ name: 'bomb.png', bytes: bomb() }), /10,000 megapixels; at most 100/],
    ['an empty file', () => ({ name: 'empty.png', bytes: '' }), /empty/],
    [
      'a ZIP',
      () => ({ name: 'all.zip', bytes: Uint8Array.from([0x50, 0x4b, 3, 4, ...Array<number>(60).fill(0)]) }),
      /ZIP is brought in under/,
    ],
    [
      'a GIF',
      () => ({
        name: 'a.gif',
        bytes: Uint8Array.from(
          Buffer.from('R0lGODlhAQABAIAAAAAAAP///yH5BAEAAAAALAAAAAABAAEAAAIBRAA7', 'base64'),
        ),
      }),
      /GIF/,
    ],
    [
      'a head of a JPEG without a picture',
      () => ({ name: 'a.jpg', bytes: Uint8Array.from([0xff, 0xd8, 0xff, 0xe0, 0, 16, 0, 0, 0, 0]) }),
      /damaged/,
    ],
    ['plain text', () => ({ name: 'notes.txt', bytes: 'notes' }), /cannot be used here/],
  ]
  test.each(cases)('%s', async (_what, make, sentence) => {
    const before = site.ctx.db.select().from(assets).all().length
    const file = make()
    const problem = (await bring(file)).problem()
    expect(problem).toMatchObject({ status: 422, kind: 'bad-file' })
    expect(problem.title).toMatch(sentence)
    expect(problem.errors).toMatchObject([{ path: ['files', 0, file.name] }])
    expect(site.ctx.db.select().from(assets).all()).toHaveLength(before)
    expect(temporary()).toEqual([])
  })

  test('a refused one harms no other', async () => {
    const good = { name: 'good.jpg', bytes: await picture(50, 50, '#fed') }
    const answer = (await bring({ name: 'bad.txt', bytes: 'text' }, good)).read(UploadAnswer)
    expect(answer.files.map((file) => file.name)).toEqual(['good.jpg'])
    expect(answer.refused).toMatchObject([{ name: 'bad.txt' }])
  })

  test('too large for a picture, too large for anything', async () => {
    const photo = new Uint8Array(41 * 1024 * 1024)
    photo.set(await picture(30, 30, '#abc'))
    expect((await bring({ name: 'large.jpg', bytes: photo })).problem().title).toContain('larger than 40 MB')
    const good = { name: 'good.stl', bytes: cubeStl(3) }
    const answer = (await bring({ name: 'large.stl', bytes: new Uint8Array(130_000_000) }, good)).read(
      UploadAnswer,
    )
    expect(answer.refused).toMatchObject([
      { name: 'large.stl', sentence: expect.stringContaining('120 MB') as string },
    ])
    expect(answer.files.map((file) => file.name)).toEqual(['good.stl'])
    expect(temporary()).toEqual([])
  })

  test('more than a hundred at once, none, and what is no form', async () => {
    const many = [...Array(101).keys()].map((at) => ({ name: `${at}.txt`, bytes: 'x' }))
    expect((await bring(...many)).problem()).toMatchObject({
      kind: 'bad-request',
      errors: [{ message: 'Bring at most 100 files at once.' }],
    })
    expect((await bring()).problem().kind).toBe('bad-request')
    expect((await site.as(person).post('/api/files', { files: [] })).problem().kind).toBe('bad-request')
    const wrongField = await site
      .as(person)
      .post(
        '/api/files',
        '--x\r\nContent-Disposition: form-data; name="other"; filename="a"\r\n\r\nx\r\n--x--\r\n',
        { 'content-type': 'multipart/form-data; boundary=x' },
      )
    expect(wrongField.problem().kind).toBe('bad-request')
    expect(temporary()).toEqual([])
  })

  test('an upload that breaks off leaves nothing', async () => {
    const { port } = new URL(site.address)
    const sending = request({
      port,
      method: 'POST',
      path: '/api/files',
      headers: {
        cookie: person.cookie,
        'content-type': 'multipart/form-data; boundary=x',
        'content-length': 1_000_000,
      },
    })
    sending.on('error', () => undefined)
    sending.write('--x\r\nContent-Disposition: form-data; name="files"; filename="a.stl"\r\n\r\n')
    sending.write(Buffer.alloc(200_000, 1))
    for (let tries = 0; temporary().length === 0 && tries < 100; tries += 1) await wait(20)
    expect(temporary()).toHaveLength(1)
    sending.destroy()
    for (let tries = 0; temporary().length > 0 && tries < 100; tries += 1) await wait(20)
    expect(temporary()).toEqual([])
  })
})

test('hashes are asked for by the list; unknown ones are left out, wrong ones named', async () => {
  const entry = await taken({ name: 'b.jpg', bytes: await picture(60, 40, '#321') })
  const answer = await site.as(person).get(`/api/files?sha256=${'0'.repeat(64)},${entry.sha256}`)
  expect(answer.read(FilesAnswer).files.map((file) => file.sha256)).toEqual([entry.sha256])
  expect((await site.as(person).get('/api/files?sha256=abc')).problem().kind).toBe('bad-request')
  expect((await site.as(person).get('/api/files')).problem().kind).toBe('bad-request')
})
