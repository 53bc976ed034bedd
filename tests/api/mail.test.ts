import { readdirSync, readFileSync } from 'node:fs'
import { once } from 'node:events'
import type { AddressInfo } from 'node:net'
import path from 'node:path'
import { SMTPServer, type SMTPServerOptions } from 'smtp-server'
import { afterEach, describe, expect, test } from 'vitest'
import { MailDetails, MailPage } from '../../shared/api/mail'
import type { Context } from '../../server/context'
import { mails } from '../../server/db/schema'
import { queueMail } from '../../server/mail/queueMail'
import { createTestSite, type TestSite } from './testSite'

/** A mail server in this process that keeps what it accepted. */
class TestMailServer {
  readonly accepted: { to: string[]; text: string }[] = []
  private readonly server: SMTPServer

  constructor(options: SMTPServerOptions) {
    this.server = new SMTPServer({
      authOptional: true,
      disabledCommands: ['STARTTLS'],
      logger: false,
      onData: (stream, session, done) => {
        let text = ''
        stream.on('data', (chunk: Buffer) => (text += chunk.toString()))
        stream.on('end', () => {
          this.accepted.push({ to: session.envelope.rcptTo.map(({ address }) => address), text })
          done()
        })
      },
      ...options,
    })
  }

  async start(port: number): Promise<void> {
    this.server.listen(port, '127.0.0.1')
    await once(this.server.server, 'listening')
  }

  get port(): number {
    return (this.server.server.address() as AddressInfo).port
  }

  get url(): string {
    return `smtp://127.0.0.1:${this.port}`
  }

  stop(): Promise<void> {
    return new Promise((resolve) => this.server.close(() => resolve()))
  }
}

let now = new Date('2026-12-01T10:00:00Z')
const opened: { close: () => Promise<void> }[] = []
afterEach(async () => {
  for (const each of opened.splice(0).reverse()) await each.close()
})

async function mailServer(options: SMTPServerOptions = {}, port = 0): Promise<TestMailServer> {
  const server = new TestMailServer(options)
  await server.start(port)
  opened.push({ close: () => server.stop() })
  return server
}

async function siteWith(smtpUrl: string | undefined): Promise<TestSite> {
  now = new Date('2026-12-01T10:00:00Z')
  const site = await createTestSite({ config: { smtpUrl }, context: { now: () => now } })
  opened.push(site)
  return site
}

const tomorrow = (): void => {
  now = new Date(now.getTime() + 24 * 3600_000)
}

function write(ctx: Context, to = 'anna@example.org', name = 'Anna', language = 'en'): void {
  ctx.db.transaction((tx) =>
    queueMail(tx, ctx, {
      to,
      language,
      template: 'confirm',
      values: { name, link: '/confirm?token=abc123' },
    }),
  )
}

const rows = (site: TestSite) => site.ctx.db.select().from(mails).all()

function smtpError(responseCode: number, message: string): Error {
  return Object.assign(new Error(message), { responseCode })
}

describe('sending', () => {
  test('goes to the mail server, once, with text and HTML and the site’s own links', async () => {
    const server = await mailServer()
    const site = await siteWith(server.url)
    write(site.ctx)
    await site.drain()
    await site.drain()
    expect(server.accepted).toHaveLength(1)
    const { to, text } = server.accepted[0]!
    expect(to).toEqual(['anna@example.org'])
    const plain = text.replace(/=\r?\n/g, '').replace(/=3D/g, '=')
    expect(plain).toContain(`${site.address}/confirm?token=abc123`)
    expect(text).toMatch(/Content-Type: text\/plain; charset=utf-8/)
    expect(text).toMatch(/Content-Type: text\/html; charset=utf-8/)
    expect(text).toMatch(/Auto-Submitted: auto-generated/)
    const [row] = rows(site)
    expect(row).toMatchObject({ state: 'sent', attempts: 1, error: null, sentAt: now })
    expect(text).toContain(`Message-ID: <${row!.id}@localhost>`)
  })

  test('a 4xx is tried again until it is accepted, with the same Message-ID', async () => {
    let tries = 0
    const server = await mailServer({
      onRcptTo: (_address, _session, done) => {
        tries += 1
        done(tries < 3 ? smtpError(451, 'Come back later') : null)
      },
    })
    const site = await siteWith(server.url)
    write(site.ctx)
    await site.drain()
    expect(rows(site)[0]).toMatchObject({ state: 'waiting', attempts: 1 })
    expect(rows(site)[0]?.error).toContain('Come back later')
    tomorrow()
    await site.drain()
    tomorrow()
    await site.drain()
    expect(rows(site)[0]).toMatchObject({ state: 'sent', attempts: 3, error: null })
    expect(server.accepted).toHaveLength(1)
  })

  test('a server that is down loses nothing, for as long as it takes', async () => {
    const gone = await mailServer()
    const { port, url } = gone
    await gone.stop()
    const site = await siteWith(url)
    write(site.ctx)
    for (let days = 0; days < 12; days += 1) {
      await site.drain()
      tomorrow()
    }
    expect(rows(site)[0]).toMatchObject({ state: 'waiting', attempts: 12 })
    const back = await mailServer({}, port)
    await site.drain()
    expect(rows(site)[0]).toMatchObject({ state: 'sent', attempts: 13, error: null })
    expect(back.accepted).toHaveLength(1)
  })

  test('a recipient refused for good is marked with the server’s words, and others still go', async () => {
    let open = false
    const server = await mailServer({
      onRcptTo: ({ address }, _session, done) =>
        done(address.startsWith('nobody') && !open ? smtpError(550, 'No such person here') : null),
    })
    const site = await siteWith(server.url)
    write(site.ctx, 'nobody@example.org')
    write(site.ctx, 'berta@example.org')
    await site.drain()
    tomorrow()
    await site.drain()
    const [refused, sent] = rows(site)
    expect(refused).toMatchObject({ state: 'refused', attempts: 1 })
    expect(refused?.error).toContain('550 No such person here')
    expect(sent?.state).toBe('sent')

    const curator = site.as(site.person('curator'))
    expect((await curator.post(`/api/mails/${sent!.id}/send-again`)).problem().kind).toBe('not-refused')
    open = true
    expect((await curator.post(`/api/mails/${refused!.id}/send-again`)).read(MailDetails)).toMatchObject({
      state: 'waiting',
      error: null,
    })
    await site.drain()
    expect(rows(site)[0]).toMatchObject({ state: 'sent', attempts: 2 })
  })

  test('wrong credentials are the site’s trouble, not the recipient’s: tried again', async () => {
    const server = await mailServer({
      authOptional: false,
      allowInsecureAuth: true,
      onAuth: (_auth, _session, done) => done(smtpError(535, 'Who are you?')),
    })
    const site = await siteWith(server.url.replace('smtp://', 'smtp://someone:wrong@'))
    write(site.ctx)
    await site.drain()
    expect(rows(site)[0]).toMatchObject({ state: 'waiting', attempts: 1 })
  })

  test('a mail is written with what causes it, or not at all', async () => {
    const site = await siteWith(undefined)
    expect(() =>
      site.ctx.db.transaction((tx) => {
        queueMail(tx, site.ctx, {
          to: 'a@example.org',
          language: 'en',
          template: 'confirm',
          values: { name: 'A', link: '/' },
        })
        throw new Error('something after it fails')
      }),
    ).toThrow('something after it fails')
    await site.drain()
    expect(rows(site)).toEqual([])
  })
})

describe('without a mail server', () => {
  test('writes one .eml file a mail into the data folder', async () => {
    const site = await siteWith(undefined)
    write(site.ctx, 'salma@example.org', 'سلمى', 'ar')
    await site.drain()
    const folder = path.join(site.dataDir, 'mail')
    const files = readdirSync(folder)
    expect(files).toHaveLength(1)
    expect(files[0]).toMatch(/^2026-12-01T10-00-00-000Z-[a-z0-9]+\.eml$/)
    const text = readFileSync(path.join(folder, files[0]!), 'utf8')
    expect(text).toContain('To: salma@example.org')
    expect(text).toContain('dir=3D"rtl"')
    expect(rows(site)[0]).toMatchObject({ state: 'sent', language: 'ar' })
  })

  test('a line break in a name makes no head of its own', async () => {
    const site = await siteWith(undefined)
    site.ctx.db.transaction((tx) =>
      queueMail(tx, site.ctx, {
        to: 'a@example.org',
        language: 'en',
        template: 'invitation',
        values: {
          link: '/',
          inviter: 'Eve\r\nBcc: all@example.org',
          guide: '<b>Pump</b>',
          role: 'author',
          translationLanguage: '',
        },
      }),
    )
    await site.drain()
    const [mail] = rows(site)
    expect(mail?.subject).toBe('Eve Bcc: all@example.org invites you to work on “<b>Pump</b>”')
    expect(mail?.html).not.toContain('<b>Pump</b>')
    const folder = path.join(site.dataDir, 'mail')
    expect(readFileSync(path.join(folder, readdirSync(folder)[0]!), 'utf8')).not.toMatch(/^Bcc:/m)
  })
})

describe('the list for curators', () => {
  test('is theirs alone', async () => {
    const site = await siteWith(undefined)
    write(site.ctx)
    const [mail] = rows(site)
    const ways = ['/api/mails', `/api/mails/${mail!.id}`]
    for (const address of ways) {
      expect((await site.as(null).get(address)).problem().kind).toBe('not-signed-in')
      for (const role of ['member', 'reviewer'] as const) {
        expect((await site.as(site.person(role)).get(address)).problem().kind).toBe('not-allowed')
        expect((await site.as(site.person(role)).post(`${ways[1]}/send-again`)).problem().kind).toBe(
          'not-allowed',
        )
      }
      expect((await site.as(site.person('curator')).get(address)).status).toBe(200)
    }
  })

  test('goes by pages, newest first, and by state', async () => {
    const site = await siteWith(undefined)
    for (let n = 0; n < 60; n += 1) write(site.ctx, `p${String(n).padStart(2, '0')}@example.org`)
    const curator = site.as(site.person('curator'))
    const first = (await curator.get('/api/mails')).read(MailPage)
    expect(first.mails).toHaveLength(50)
    const second = (await curator.get(`/api/mails?cursor=${encodeURIComponent(first.next!)}`)).read(MailPage)
    expect(second.next).toBeNull()
    const all = [...first.mails, ...second.mails].map(({ recipient }) => recipient)
    expect(new Set(all).size).toBe(60)
    expect((await curator.get('/api/mails?state=sent')).read(MailPage).mails).toEqual([])
    expect((await curator.get('/api/mails?cursor=nonsense')).problem().kind).toBe('bad-request')
    expect((await curator.get('/api/mails/none')).problem().kind).toBe('not-found')
  })

  test('shows links where mails stay on this machine, and hides what opens accounts where they are sent', async () => {
    const local = await siteWith(undefined)
    write(local.ctx)
    const [mail] = rows(local)
    const shown = (await local.as(local.person('curator')).get(`/api/mails/${mail!.id}`)).read(MailDetails)
    expect(shown.text).toContain('token=abc123')

    const server = await mailServer()
    const remote = await siteWith(server.url)
    write(remote.ctx)
    const [sent] = rows(remote)
    const hidden = (await remote.as(remote.person('curator')).get(`/api/mails/${sent!.id}`)).read(MailDetails)
    expect(hidden.text + hidden.html).not.toContain('abc123')
    expect(hidden.text).toContain('/confirm?token=…')
  })
})
