import { afterEach, beforeEach, describe, expect, test } from 'vitest'
import { strFromU8, unzipSync } from 'fflate'
import { Account, DemoAccounts, Leaving, SessionList } from '../../shared/api/accounts'
import { DEMO_DOMAIN, DEMO_PASSWORD } from '../../shared/access/demoAddress'
import { FORMER_MEMBER } from '../../shared/access/formerMember'
import { addAccount } from '../../server/auth/addAccount'
import { assets, guideMembers, guides, mails, revisions, users } from '../../server/db/schema'
import { createTestSite, Client, type Answer, type TestSite } from './testSite'
import { insertGuide, type GuideOptions } from './insertGuide'

const PASSWORD = 'seven green wheels turn'
const ANNA = { name: 'Anna Holm', email: 'anna@example.org', password: PASSWORD, language: 'en' }

let site: TestSite
beforeEach(async () => {
  site = await createTestSite()
})
afterEach(() => site.close())

/** Mails to an address, oldest first. */
const mailsTo = (address: string) =>
  site.ctx.db
    .select()
    .from(mails)
    .all()
    .filter(({ recipient }) => recipient === address)

/** What stands behind "token=" in the newest mail to an address. */
function tokenTo(address: string): string {
  const found = /token=([^\s&]+)/.exec(mailsTo(address).at(-1)?.text ?? '')
  if (found === null) throw new Error(`No link to ${address}`)
  return found[1]!
}

/** Whoever keeps the cookies of this answer. */
function after(answer: Answer): Client {
  const cookies = answer.headers
    .getSetCookie()
    .map((cookie) => cookie.split(';', 1)[0]!)
    .filter((cookie) => !cookie.endsWith('='))
  return new Client(site.address, cookies.join('; '))
}

const nobody = () => site.as(null)
const signIn = (email: string, password: string) => nobody().post('/api/sessions', { email, password })

/** Signs up and confirms. @returns the client that is signed in */
async function signUp(person = ANNA): Promise<Client> {
  expect((await nobody().post('/api/accounts', person)).status).toBe(202)
  const confirmed = await nobody().post('/api/accounts/confirmed', { token: tokenTo(person.email) })
  expect(confirmed.json).toEqual({ signedIn: true })
  return after(confirmed)
}

const addGuide = (id: string, ownerId: string, options: GuideOptions = {}) =>
  insertGuide(site, id, ownerId, options)

describe('signing up', () => {
  test('asks for a confirmation, refuses to sign in until it came, and signs in by it', async () => {
    await nobody().post('/api/accounts', ANNA)
    const early = await signIn(ANNA.email, PASSWORD)
    expect(early.problem()).toMatchObject({ status: 403, kind: 'not-confirmed' })
    expect(early.headers.getSetCookie()).toEqual([])

    const confirmed = await nobody().post('/api/accounts/confirmed', { token: tokenTo(ANNA.email) })
    expect(confirmed.json).toEqual({ signedIn: true })
    const account = (await after(confirmed).get('/api/account')).read(Account)
    expect(account).toMatchObject({ name: 'Anna Holm', email: ANNA.email, language: 'en', hasPassword: true })
    expect((await signIn(ANNA.email, PASSWORD)).status).toBe(200)
  })

  test('sends the mail again when asked', async () => {
    await nobody().post('/api/accounts', ANNA)
    await nobody().post('/api/accounts/confirmation', { email: ANNA.email })
    expect(mailsTo(ANNA.email).map(({ subject }) => subject)).toEqual([
      'Confirm your e-mail address',
      'Confirm your e-mail address',
    ])
    expect((await nobody().post('/api/accounts/confirmed', { token: tokenTo(ANNA.email) })).status).toBe(200)
  })

  test('names every field that is wrong, with a sentence', async () => {
    const answer = await nobody().post('/api/accounts', {
      name: ' ',
      email: 'anna',
      password: 'short',
      language: 'en',
    })
    const { kind, errors } = answer.problem()
    expect(kind).toBe('bad-request')
    expect(errors?.map(({ path }) => path.join('.'))).toEqual(['name', 'email', 'password'])
    expect(errors?.[2]?.message).toContain('10 to 200 characters')
  })

  test('answers the same whether or not the address has an account', async () => {
    await signUp()
    const known = await nobody().post('/api/accounts', { ...ANNA, name: 'Somebody else' })
    const unknown = await nobody().post('/api/accounts', { ...ANNA, email: 'nobody@example.org' })
    expect([known.status, known.text]).toEqual([unknown.status, unknown.text])
    expect(mailsTo(ANNA.email).at(-1)?.subject).toBe('You have an account already')
    expect((await signIn(ANNA.email, PASSWORD)).status).toBe(200)

    for (const path of ['/api/accounts/confirmation', '/api/sessions/link', '/api/passwords/reset']) {
      const [here, not] = [
        await nobody().post(path, { email: ANNA.email }),
        await nobody().post(path, { email: 'x@example.org' }),
      ]
      expect([path, here.status, here.text]).toEqual([path, not.status, not.text])
    }
    expect(mailsTo('x@example.org')).toEqual([])
    const [wrong, none] = [
      await signIn(ANNA.email, 'not the password'),
      await signIn('x@example.org', 'not the password'),
    ]
    expect([wrong.status, wrong.text]).toEqual([none.status, none.text])
  })

  test('a second sign-up with an unconfirmed address makes the first one void, link and password', async () => {
    await nobody().post('/api/accounts', { ...ANNA, password: 'of the one before' })
    const first = tokenTo(ANNA.email)
    await nobody().post('/api/accounts', ANNA)
    expect((await nobody().post('/api/accounts/confirmed', { token: first })).problem().kind).toBe(
      'link-spent',
    )
    await nobody().post('/api/accounts/confirmed', { token: tokenTo(ANNA.email) })
    expect((await signIn(ANNA.email, 'of the one before')).problem().kind).toBe('wrong-password')
    expect((await signIn(ANNA.email, PASSWORD)).status).toBe(200)
  })

  test('the first who confirms on a fresh site is its curator, the second is not', async () => {
    const first = await signUp()
    const second = await signUp({ ...ANNA, email: 'berta@example.org' })
    expect((await first.get('/api/account')).read(Account).role).toBe('curator')
    expect((await second.get('/api/account')).read(Account).role).toBe('member')
  })

  test('nobody can give themselves a role', async () => {
    await signUp()
    await nobody().post('/api/accounts', { ...ANNA, email: 'eve@example.org', role: 'curator' })
    const eve = after(await nobody().post('/api/accounts/confirmed', { token: tokenTo('eve@example.org') }))
    await eve.patch('/api/account', { name: 'Eve', role: 'curator' })
    expect((await eve.get('/api/account')).read(Account)).toMatchObject({ name: 'Eve', role: 'member' })
  })
})

describe('signing in', () => {
  test('sets cookies that scripts cannot read, but for the name', async () => {
    await signUp()
    const cookies = (await signIn(ANNA.email, PASSWORD)).headers.getSetCookie()
    const session = cookies.find((cookie) => cookie.startsWith('quern.session_token='))
    expect(session).toMatch(/HttpOnly/i)
    expect(session).toMatch(/SameSite=Lax/i)
    expect(session).not.toMatch(/Secure/i)
    const name = cookies.find((cookie) => cookie.startsWith('quern_name='))
    expect(name).toMatch(/^quern_name=Anna%20Holm;/)
    expect(name).not.toMatch(/HttpOnly/i)
  })

  test('sets secure cookies where the site is at https', async () => {
    const secure = await createTestSite({ config: { appUrl: 'https://guides.example.org' } })
    try {
      await addAccount(secure.ctx, ANNA)
      const answer = await secure.as(null).post('/api/sessions', { email: ANNA.email, password: PASSWORD })
      const cookies = answer.headers.getSetCookie()
      expect(cookies.length).toBeGreaterThan(1)
      for (const cookie of cookies) expect(cookie).toMatch(/; Secure/i)
    } finally {
      await secure.close()
    }
  })

  test('by a mailed link, once', async () => {
    await signUp()
    await nobody().post('/api/sessions/link', { email: ANNA.email, next: '/drafts' })
    expect(mailsTo(ANNA.email).at(-1)?.text).toContain('&next=%2Fdrafts')
    const token = tokenTo(ANNA.email)
    const first = await nobody().post('/api/sessions/by-link', { token })
    expect((await after(first).get('/api/account')).status).toBe(200)
    expect((await nobody().post('/api/sessions/by-link', { token })).problem()).toMatchObject({
      status: 410,
      kind: 'link-spent',
    })
  })

  test('a link leads to no other site', async () => {
    for (const next of ['https://evil.example.org', '//evil.example.org', '/\\evil.example.org']) {
      expect((await nobody().post('/api/sessions/link', { email: ANNA.email, next })).problem().kind).toBe(
        'bad-request',
      )
    }
  })

  test('is refused after ten tries in a quarter of an hour, and says so', async () => {
    await signUp()
    for (let tries = 0; tries < 10; tries += 1) await signIn(ANNA.email, `wrong ${tries} password`)
    expect((await signIn(ANNA.email, PASSWORD)).problem()).toMatchObject({
      status: 429,
      kind: 'too-many-tries',
      values: { minutes: 15 },
    })
  })

  test('ends by signing out, at once', async () => {
    const anna = await signUp()
    const out = await anna.delete('/api/sessions/current')
    expect(out.status).toBe(204)
    expect(out.headers.getSetCookie().join('\n')).toMatch(/quern_name=;/)
    expect((await anna.get('/api/account')).problem().kind).toBe('not-signed-in')
  })

  test('a write that another site causes is nobody’s', async () => {
    const anna = await signUp()
    const headers = { 'sec-fetch-site': 'cross-site' }
    expect((await anna.patch('/api/account', { name: 'Owned' }, headers)).problem().kind).toBe(
      'not-signed-in',
    )
  })
})

describe('passwords', () => {
  test('are reset by a mail: the link works once and ends all sessions', async () => {
    const anna = await signUp()
    await nobody().post('/api/passwords/reset', { email: ANNA.email })
    const token = tokenTo(ANNA.email)
    expect(
      (await nobody().post('/api/passwords', { token, password: 'short' })).problem().errors?.[0]?.path,
    ).toEqual(['password'])
    expect((await nobody().post('/api/passwords', { token, password: 'another long one' })).status).toBe(204)
    expect((await anna.get('/api/account')).status).toBe(401)
    expect((await signIn(ANNA.email, PASSWORD)).problem().kind).toBe('wrong-password')
    expect((await signIn(ANNA.email, 'another long one')).status).toBe(200)
    expect(
      (await nobody().post('/api/passwords', { token, password: 'a third long one' })).problem().kind,
    ).toBe('link-spent')
    expect(mailsTo(ANNA.email).at(-1)?.subject).toBe('Your password was changed')
  })

  test('are changed with the old one, and all other devices are signed out', async () => {
    const here = await signUp()
    const there = after(await signIn(ANNA.email, PASSWORD))
    const wrong = await here.put('/api/account/password', {
      current: 'no such password',
      password: 'another long one',
    })
    expect(wrong.problem().errors).toEqual([{ path: ['current'], message: 'This is not your password.' }])
    const changed = await here.put('/api/account/password', {
      current: PASSWORD,
      password: 'another long one',
    })
    expect(changed.status).toBe(200)
    expect((await after(changed).get('/api/account')).status).toBe(200)
    expect((await there.get('/api/account')).status).toBe(401)
    expect(mailsTo(ANNA.email).at(-1)?.subject).toBe('Your password was changed')
  })

  test('can be set by somebody who has none', async () => {
    const berta = site.as(site.person())
    expect(
      (await berta.put('/api/account/password', { current: '', password: PASSWORD })).read(Account)
        .hasPassword,
    ).toBe(true)
  })
})

describe('the own account', () => {
  test('changes name and language', async () => {
    const anna = await signUp()
    const changed = await anna.patch('/api/account', { name: 'Anna Berg', language: 'ar' })
    expect(changed.read(Account)).toMatchObject({ name: 'Anna Berg', language: 'ar' })
    expect(changed.headers.getSetCookie().join()).toContain('quern_name=Anna%20Berg')
    await anna.post('/api/account/email', { email: 'new@example.org' })
    expect(mailsTo(ANNA.email).at(-1)).toMatchObject({ language: 'ar' })
    expect(mailsTo(ANNA.email).at(-1)?.html).toContain('<html lang="ar" dir="rtl">')
  })

  test('changes its address when the new one is confirmed, with a notice to the old one', async () => {
    const anna = await signUp()
    expect((await anna.post('/api/account/email', { email: 'new@example.org' })).status).toBe(202)
    expect(mailsTo(ANNA.email).at(-1)?.subject).toBe('Your e-mail address is about to change')
    expect((await anna.get('/api/account')).read(Account).email).toBe(ANNA.email)
    await anna.post('/api/accounts/confirmed', { token: tokenTo('new@example.org') })
    expect((await anna.get('/api/account')).read(Account).email).toBe('new@example.org')
    expect((await signIn('new@example.org', PASSWORD)).status).toBe(200)
    expect((await signIn(ANNA.email, PASSWORD)).problem().kind).toBe('wrong-password')
  })

  test('does not tell that an address is somebody else’s, nor take it', async () => {
    const anna = await signUp()
    await signUp({ ...ANNA, email: 'berta@example.org' })
    const taken = await anna.post('/api/account/email', { email: 'berta@example.org' })
    const free = await anna.post('/api/account/email', { email: 'free@example.org' })
    expect([taken.status, taken.text]).toEqual([free.status, free.text])
    expect(mailsTo('berta@example.org').at(-1)?.subject).toBe('You have an account already')
  })

  test('lists and ends its sessions, and nobody else’s', async () => {
    await signUp()
    const firefox = 'Mozilla/5.0 (X11; Linux x86_64; rv:140.0) Gecko/20100101 Firefox/140.0'
    const there = after(
      await nobody().post(
        '/api/sessions',
        { email: ANNA.email, password: PASSWORD },
        { 'user-agent': firefox },
      ),
    )
    const here = after(await signIn(ANNA.email, PASSWORD))
    const { sessions } = (await here.get('/api/account/sessions')).read(SessionList)
    expect(sessions).toHaveLength(3)
    expect(sessions.filter(({ current }) => current)).toHaveLength(1)
    const found = sessions.find(({ browser }) => browser === 'Firefox')!
    expect(found).toMatchObject({ system: 'Linux', current: false })

    const stranger = site.as(site.person())
    expect((await stranger.delete(`/api/account/sessions/${found.id}`)).problem().kind).toBe('not-found')
    expect((await here.delete(`/api/account/sessions/${found.id}`)).status).toBe(204)
    expect((await there.get('/api/account')).status).toBe(401)
    expect((await here.delete('/api/account/sessions')).status).toBe(204)
    expect((await here.get('/api/account/sessions')).read(SessionList).sessions).toHaveLength(1)
  })

  test('hands out everything that it holds', async () => {
    const anna = await signUp()
    const { id } = (await anna.get('/api/account')).read(Account)
    addGuide('pump', id, { published: true })
    site.ctx.db
      .insert(assets)
      .values({
        sha256: 'a'.repeat(64),
        kind: 'picture',
        mediaType: 'image/jpeg',
        bytes: 3,
        name: 'tip.jpg',
        state: 'ready',
        uploadedBy: id,
        createdAt: site.ctx.now(),
      })
      .run()
    const files = unzipSync((await anna.get('/api/account/data')).bytes)
    expect(Object.keys(files).sort()).toEqual([
      'account.json',
      'drafts/pump.json',
      'mails.json',
      'revisions/pump-A.json',
      'saves.json',
      'sessions.json',
      'uploads.json',
    ])
    const text = Object.values(files)
      .map((bytes) => strFromU8(bytes))
      .join('\n')
    expect(text).toContain('Guide pump')
    expect(text).toContain('tip.jpg')
    expect(strFromU8(files['account.json']!)).not.toContain('password')
    expect(strFromU8(files['sessions.json']!)).not.toContain('token')
  })
})

describe('leaving', () => {
  test('asks for the password, passes guides on as chosen, and forgets the person', async () => {
    const heir = site.person('member', { name: 'Hedda' })
    const coOwner = site.person('member', { name: 'Olaf' })
    const anna = await signUp()
    const { id } = (await anna.get('/api/account')).read(Account)
    addGuide('alone', id, { published: true, byline: 'Anna Holm' })
    addGuide('inherited', id)
    addGuide('shared', id)
    addGuide('sketch', id)
    site.give(heir, 'inherited', 'author')
    site.give(coOwner, 'shared', 'owner')

    const leaving = (await anna.get('/api/account/leaving')).read(Leaving)
    expect(leaving.revisions).toBe(1)
    expect(
      leaving.guides.map(({ guideId, published, owners, heirs }) => [
        guideId,
        published,
        owners,
        heirs.map(({ name }) => name),
      ]),
    ).toEqual([
      ['alone', true, [], []],
      ['inherited', false, [], ['Hedda']],
      ['shared', false, ['Olaf'], []],
      ['sketch', false, [], []],
    ])

    const choices = [
      { guideId: 'alone', to: 'former member' },
      { guideId: 'inherited', to: 'heir', userId: heir.id },
      { guideId: 'sketch', to: 'removed' },
    ]
    const wanted = { proof: PASSWORD, guides: choices, name: 'former member' }
    const unproven = await anna.post('/api/account/deletion', { ...wanted, proof: 'wrong password' })
    expect(unproven.problem().errors?.[0]).toEqual({ path: ['proof'], message: 'This is not your password.' })
    const undecided = await anna.post('/api/account/deletion', { ...wanted, guides: choices.slice(1) })
    expect(undecided.problem().errors).toEqual([
      { path: ['guides', 'alone'], message: 'Say who has this guide from now on.' },
    ])
    const published = await anna.post('/api/account/deletion', {
      ...wanted,
      guides: [{ guideId: 'alone', to: 'removed' }, ...choices.slice(1)],
    })
    expect(published.problem().errors?.[0]?.path).toEqual(['guides', 'alone'])
    const stranger = await anna.post('/api/account/deletion', {
      ...wanted,
      guides: [choices[0], { guideId: 'inherited', to: 'heir', userId: coOwner.id }, choices[2]],
    })
    expect(stranger.problem().errors?.[0]?.path).toEqual(['guides', 'inherited'])
    expect((await anna.get('/api/account')).status).toBe(200)

    expect((await anna.post('/api/account/deletion', wanted)).status).toBe(204)
    const { db } = site.ctx
    expect((await anna.get('/api/account')).status).toBe(401)
    expect(
      db
        .select()
        .from(users)
        .all()
        .some((user) => user.id === id),
    ).toBe(false)
    expect(
      db
        .select()
        .from(guides)
        .all()
        .map(({ slug, byline }) => [slug, byline]),
    ).toEqual([
      ['alone', FORMER_MEMBER],
      ['inherited', 'A workshop'],
      ['shared', 'A workshop'],
    ])
    expect(
      db
        .select()
        .from(guideMembers)
        .all()
        .map(({ guideId, userId, role }) => [guideId, userId, role])
        .sort(),
    ).toEqual([
      ['inherited', heir.id, 'author'],
      ['inherited', heir.id, 'owner'],
      ['shared', coOwner.id, 'owner'],
    ])
    expect(db.select().from(revisions).all()[0]).toMatchObject({
      publishedByName: FORMER_MEMBER,
      publishedBy: null,
    })
    expect(mailsTo(ANNA.email).map(({ subject }) => subject)).toEqual(['Your account was deleted'])
  })

  test('keeps the author’s name on revisions when that is chosen', async () => {
    const anna = await signUp()
    addGuide('alone', (await anna.get('/api/account')).read(Account).id, { published: true })
    const wanted = { proof: PASSWORD, guides: [{ guideId: 'alone', to: 'former member' }], name: 'keep' }
    expect((await anna.post('/api/account/deletion', wanted)).status).toBe(204)
    expect(site.ctx.db.select().from(revisions).all()[0]).toMatchObject({
      publishedByName: 'Anna Holm',
      publishedBy: null,
    })
  })

  test('is not for the last curator while there are others', async () => {
    const curator = await signUp()
    site.person()
    const wanted = { proof: PASSWORD, guides: [], name: 'keep' }
    expect((await curator.post('/api/account/deletion', wanted)).problem().kind).toBe('last-curator')
    site.person('curator')
    expect((await curator.post('/api/account/deletion', wanted)).status).toBe(204)
  })

  test('somebody without a password types the address', async () => {
    const person = site.person()
    const wanted = { guides: [], name: 'keep' }
    expect(
      (await site.as(person).post('/api/account/deletion', { ...wanted, proof: 'x@example.org' })).problem()
        .errors?.[0]?.path,
    ).toEqual(['proof'])
    expect(
      (await site.as(person).post('/api/account/deletion', { ...wanted, proof: person.email })).status,
    ).toBe(204)
  })
})

describe('the demo', () => {
  const mira = {
    name: 'Mira',
    email: `mira@${DEMO_DOMAIN}`,
    password: DEMO_PASSWORD,
    role: 'curator' as const,
  }

  test('lists its accounts in demo mode only', async () => {
    expect((await nobody().get('/api/demo/accounts')).json).toEqual({ accounts: [] })
    const demo = await createTestSite({ config: { demo: true } })
    try {
      await addAccount(demo.ctx, mira)
      await addAccount(demo.ctx, ANNA)
      const listed = (await demo.as(null).get('/api/demo/accounts')).read(DemoAccounts)
      expect(listed).toEqual({
        password: DEMO_PASSWORD,
        accounts: [{ name: 'Mira', email: mira.email, role: 'curator' }],
      })
      expect((await demo.as(null).post('/api/sessions', mira)).status).toBe(200)
    } finally {
      await demo.close()
    }
  })

  test('its accounts open nothing outside of demo mode, and do not count as the first', async () => {
    await addAccount(site.ctx, mira)
    expect((await signIn(mira.email, DEMO_PASSWORD)).problem().kind).toBe('wrong-password')
    expect((await (await signUp()).get('/api/account')).read(Account).role).toBe('curator')
  })

  test('makes nobody a curator who only signs up', async () => {
    const demo = await createTestSite({ config: { demo: true } })
    try {
      await demo.as(null).post('/api/accounts', ANNA)
      const [mail] = demo.ctx.db.select().from(mails).all()
      const token = /token=(\S+)/.exec(mail!.text)![1]
      await demo.as(null).post('/api/accounts/confirmed', { token })
      expect(demo.ctx.db.select().from(users).all()).toMatchObject([{ emailVerified: true, role: 'member' }])
    } finally {
      await demo.close()
    }
  })
})
