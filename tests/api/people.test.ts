import { afterEach, beforeEach, describe, expect, test } from 'vitest'
import { GUIDE_ROLES, SITE_ROLES } from '../../shared/access/ability'
import { AcceptedInvitation, GuidePeople, Invitation, SitePeople, SitePerson } from '../../shared/api/people'
import { guideMembers, invitations, mails } from '../../server/db/schema'
import { insertGuide } from './insertGuide'
import { createTestSite, type TestPerson, type TestSite } from './testSite'

let site: TestSite
let now: Date
let owner: TestPerson

beforeEach(async () => {
  now = new Date('2026-12-01T10:00:00Z')
  site = await createTestSite({ context: { now: () => now } })
  owner = site.person('member', { name: 'Odile' })
  insertGuide(site, 'pump', owner.id)
})
afterEach(() => site.close())

const PEOPLE = '/api/guides/pump/people'
const INVITE = '/api/guides/pump/invitations'

function tokenTo(address: string): string {
  const mail = site.ctx.db
    .select()
    .from(mails)
    .all()
    .findLast(({ recipient }) => recipient === address)
  const found = /\/invitations\/(\S+)/.exec(mail?.text ?? '')
  if (found === null) throw new Error(`No invitation to ${address}`)
  return found[1]!
}

const rolesOf = (person: TestPerson) =>
  site.ctx.db
    .select()
    .from(guideMembers)
    .all()
    .filter(({ userId }) => userId === person.id)
    .map(({ role, language }) => (language === '' ? role : `${role} ${language}`))

/** One person of every standing, with the name that the table below uses. */
function standings(): Record<string, TestPerson | null> {
  const people: Record<string, TestPerson | null> = { nobody: null, owner }
  for (const role of SITE_ROLES) people[`site ${role}`] = site.person(role)
  for (const role of GUIDE_ROLES.filter((held) => held !== 'owner')) {
    const person = site.person()
    site.give(person, 'pump', role, role === 'translator' ? 'ar' : '')
    people[role] = person
  }
  return people
}

describe('who may do what', () => {
  // Site roles stand for people without a role on the guide. A guide that one may not see is not there (404).
  const TABLE: Record<
    string,
    [
      see: number,
      invite: number,
      withdraw: number,
      change: number,
      remove: number,
      list: number,
      setRole: number,
    ]
  > = {
    nobody: [401, 401, 401, 401, 401, 401, 401],
    'site member': [404, 404, 404, 404, 404, 403, 403],
    'site reviewer': [200, 403, 403, 403, 403, 403, 403],
    'site curator': [200, 403, 403, 403, 403, 200, 200],
    translator: [200, 403, 403, 403, 403, 403, 403],
    reviewer: [200, 403, 403, 403, 403, 403, 403],
    author: [200, 403, 403, 403, 403, 403, 403],
    owner: [200, 201, 200, 204, 204, 403, 403],
  }

  test.each(Object.entries(TABLE))('%s', async (standing, expected) => {
    const people = standings()
    const guest = site.person()
    site.give(guest, 'pump', 'reviewer')
    await site.as(owner).post(INVITE, { email: 'guest@example.org', role: 'author' })
    const [invitation] = site.ctx.db.select().from(invitations).all()
    const client = site.as(people[standing]!)
    const role = (name: string) => ({ role: name, language: '' })
    const got = [
      await client.get(PEOPLE),
      await client.post(INVITE, { email: 'new@example.org', role: 'author' }),
      await client.delete(`${INVITE}/${invitation!.id}`),
      await client.patch(`${PEOPLE}/${guest.id}`, { from: role('reviewer'), to: role('author') }),
      await client.delete(`${PEOPLE}/${guest.id}`),
      await client.get('/api/people'),
      await client.patch(`/api/people/${guest.id}`, { role: 'reviewer' }),
    ].map(({ status }) => status)
    expect(got).toEqual(expected)
  })

  test.each([
    ['nobody', 401],
    ['site member', 404],
    ['site reviewer', 403],
    ['site curator', 403],
    ['translator', 204],
    ['reviewer', 204],
    ['author', 204],
    ['owner', 409],
  ])('leaving, as %s', async (standing, expected) => {
    const people = standings()
    expect((await site.as(people[standing]!).delete(`${PEOPLE}/me`)).status).toBe(expected)
  })
})

describe('the people of a guide', () => {
  test('show addresses and invitations to owners only', async () => {
    const author = site.person('member', { name: 'Aron' })
    site.give(author, 'pump', 'author')
    site.give(author, 'pump', 'translator', 'ar')
    await site.as(owner).post(INVITE, { email: 'guest@example.org', role: 'reviewer' })
    const forOwner = (await site.as(owner).get(PEOPLE)).read(GuidePeople)
    expect(forOwner).toMatchObject({ title: 'Guide pump', mayManage: true, mayLeave: true })
    expect(forOwner.people.map(({ name, email }) => [name, email])).toEqual([
      ['Aron', author.email],
      ['Odile', owner.email],
    ])
    expect(forOwner.people[0]!.roles).toEqual([
      { role: 'author', language: '' },
      { role: 'translator', language: 'ar' },
    ])
    expect(forOwner.invitations).toMatchObject([{ email: 'guest@example.org', expired: false }])
    const forAuthor = (await site.as(author).get(PEOPLE)).read(GuidePeople)
    expect(forAuthor.people.map(({ email }) => email)).toEqual([null, null])
    expect(forAuthor).toMatchObject({ invitations: [], mayManage: false })
  })

  test('change role, and keep an owner', async () => {
    const author = site.person()
    site.give(author, 'pump', 'author')
    const to = (role: string, language = '') => ({ role, language })
    const change = (person: TestPerson, from: object, into: object) =>
      site.as(owner).patch(`${PEOPLE}/${person.id}`, { from, to: into })
    expect((await change(owner, to('owner'), to('author'))).problem().kind).toBe('last-owner')
    expect((await site.as(owner).delete(`${PEOPLE}/${owner.id}`)).problem().kind).toBe('last-owner')
    expect(rolesOf(owner)).toEqual(['owner'])
    expect((await change(author, to('author'), to('translator'))).problem().errors?.[0]?.path).toEqual([
      'to',
      'language',
    ])
    expect((await change(author, to('reviewer'), to('owner'))).problem().kind).toBe('not-found')
    expect((await change(author, to('author'), to('translator', 'ar'))).status).toBe(204)
    expect(rolesOf(author)).toEqual(['translator ar'])
    expect((await change(author, to('translator', 'ar'), to('owner'))).status).toBe(204)
    expect((await change(owner, to('owner'), to('author'))).status).toBe(204)
    expect(rolesOf(owner)).toEqual(['author'])
    // What was taken away is gone at once.
    expect(
      (await site.as(owner).post(INVITE, { email: 'x@example.org', role: 'author' })).problem().kind,
    ).toBe('not-allowed')
  })

  test('who works on a guide without an owner can still leave it', async () => {
    insertGuide(site, 'orphan', owner.id)
    const author = site.person()
    site.give(author, 'orphan', 'author')
    site.ctx.db.delete(guideMembers).run()
    site.give(author, 'orphan', 'author')
    expect((await site.as(author).delete('/api/guides/orphan/people/me')).status).toBe(204)
  })
})

describe('an invitation', () => {
  test('is a mail with a link that gives the role once', async () => {
    const guest = site.person('member', { email: 'guest@example.org' })
    await site.as(owner).post(INVITE, { email: ' Guest@Example.org ', role: 'translator', language: 'ar' })
    const token = tokenTo('guest@example.org')
    expect(JSON.stringify(site.ctx.db.select().from(invitations).all())).not.toContain(token)

    const read = (await site.as(null).post('/api/invitations/read', { token })).read(Invitation)
    expect(read).toEqual({
      guideTitle: 'Guide pump',
      invitedBy: 'Odile',
      email: 'guest@example.org',
      role: 'translator',
      language: 'ar',
      state: 'open',
    })
    expect((await site.as(null).post('/api/invitations/accept', { token })).problem().kind).toBe(
      'not-signed-in',
    )
    const accepted = await site.as(guest).post('/api/invitations/accept', { token })
    expect(accepted.read(AcceptedInvitation)).toEqual({ guideId: 'pump' })
    expect(rolesOf(guest)).toEqual(['translator ar'])
    expect((await site.as(guest).get(PEOPLE)).status).toBe(200)
    expect((await site.as(guest).post('/api/invitations/accept', { token })).problem().kind).toBe(
      'invitation-over',
    )
    expect((await site.as(null).post('/api/invitations/read', { token })).read(Invitation).state).toBe(
      'accepted',
    )
  })

  test('to another address is accepted only when that is meant', async () => {
    const guest = site.person('member', { email: 'work@example.org' })
    await site.as(owner).post(INVITE, { email: 'home@example.org', role: 'author' })
    const token = tokenTo('home@example.org')
    expect((await site.as(guest).post('/api/invitations/accept', { token })).problem()).toMatchObject({
      kind: 'other-address',
      values: { invited: 'home@example.org', yours: 'work@example.org' },
    })
    expect(rolesOf(guest)).toEqual([])
    expect((await site.as(guest).post('/api/invitations/accept', { token, otherAddress: true })).status).toBe(
      200,
    )
    expect(rolesOf(guest)).toEqual(['author'])
  })

  test('holds 14 days', async () => {
    const guest = site.person('member', { email: 'guest@example.org' })
    await site.as(owner).post(INVITE, { email: guest.email, role: 'author' })
    const token = tokenTo(guest.email)
    now = new Date('2026-12-15T09:59:59Z')
    expect((await site.as(null).post('/api/invitations/read', { token })).read(Invitation).state).toBe('open')
    now = new Date('2026-12-15T10:00:00Z')
    expect((await site.as(null).post('/api/invitations/read', { token })).read(Invitation).state).toBe(
      'expired',
    )
    expect((await site.as(guest).post('/api/invitations/accept', { token })).problem().kind).toBe(
      'invitation-over',
    )
    expect((await site.as(owner).get(PEOPLE)).read(GuidePeople).invitations).toMatchObject([
      { expired: true },
    ])
  })

  test('can be withdrawn, and is replaced by a newer one for the same role', async () => {
    const guest = site.person('member', { email: 'guest@example.org' })
    await site.as(owner).post(INVITE, { email: guest.email, role: 'author' })
    const first = tokenTo(guest.email)
    await site.as(owner).post(INVITE, { email: guest.email, role: 'author' })
    expect((await site.as(guest).post('/api/invitations/accept', { token: first })).problem().kind).toBe(
      'invitation-over',
    )
    const { invitations: open } = (await site.as(owner).get(PEOPLE)).read(GuidePeople)
    expect(open).toHaveLength(1)
    expect((await site.as(owner).delete(`${INVITE}/${open[0]!.id}`)).read(GuidePeople).invitations).toEqual(
      [],
    )
    expect(
      (await site.as(guest).post('/api/invitations/accept', { token: tokenTo(guest.email) })).problem().kind,
    ).toBe('invitation-over')
    expect((await site.as(owner).delete(`${INVITE}/${open[0]!.id}`)).problem().kind).toBe('not-found')
  })

  test('of one guide cannot be withdrawn through another', async () => {
    const other = site.person()
    insertGuide(site, 'stove', other.id)
    await site.as(owner).post(INVITE, { email: 'guest@example.org', role: 'author' })
    const [invitation] = site.ctx.db.select().from(invitations).all()
    expect(
      (await site.as(other).delete(`/api/guides/stove/invitations/${invitation!.id}`)).problem().kind,
    ).toBe('not-found')
  })

  test('names what is wrong with it', async () => {
    const answer = await site.as(owner).post(INVITE, { email: 'nowhere', role: 'translator' })
    expect(answer.problem().errors?.map(({ path }) => path[0])).toContain('email')
    expect(
      (await site.as(owner).post(INVITE, { email: 'x@example.org', role: 'translator' })).problem()
        .errors?.[0]?.path,
    ).toEqual(['language'])
    expect(
      (await site.as(owner).post(INVITE, { email: 'x@example.org', role: 'king' })).problem().errors?.[0]
        ?.path,
    ).toEqual(['role'])
    expect(
      (await site.as(owner).post(INVITE, { email: owner.email, role: 'owner' })).problem(),
    ).toMatchObject({ kind: 'already-member', values: { email: owner.email } })
    expect((await site.as(null).post('/api/invitations/read', { token: 'made up' })).problem().kind).toBe(
      'not-found',
    )
  })
})

describe('the people of the site', () => {
  test('are found by name and address, taken by the letter', async () => {
    site.person('member', { name: 'Per_Cent', email: 'a%b@example.org' })
    const curator = site.as(site.person('curator', { name: 'Cora' }))
    const found = async (search: string) =>
      (await curator.get(`/api/people?search=${encodeURIComponent(search)}`))
        .read(SitePeople)
        .people.map(({ name }) => name)
    expect(await found('odil')).toEqual(['Odile'])
    expect(await found('a%b')).toEqual(['Per_Cent'])
    expect(await found('r_C')).toEqual(['Per_Cent'])
    expect(await found('%')).toEqual(['Per_Cent'])
    expect(await found('nobody')).toEqual([])
    expect(new Set(await found(''))).toEqual(new Set(['Cora', 'Odile', 'Per_Cent']))
  })

  test('come in pages', async () => {
    for (let n = 0; n < 60; n += 1) site.person()
    const curator = site.as(site.person('curator'))
    const first = (await curator.get('/api/people')).read(SitePeople)
    const second = (await curator.get(`/api/people?cursor=${first.next}`)).read(SitePeople)
    expect(new Set([...first.people, ...second.people].map(({ id }) => id)).size).toBe(62)
    expect(second.next).toBeNull()
  })

  test('have their role set by a curator, who cannot set their own', async () => {
    const cora = site.person('curator')
    const curator = site.as(cora)
    expect(
      (await curator.patch(`/api/people/${owner.id}`, { role: 'reviewer' })).read(SitePerson),
    ).toMatchObject({ role: 'reviewer', guides: 1 })
    expect((await curator.patch(`/api/people/${cora.id}`, { role: 'member' })).problem().kind).toBe(
      'own-role',
    )
    expect((await curator.patch('/api/people/none', { role: 'member' })).problem().kind).toBe('not-found')
    expect((await curator.patch(`/api/people/${owner.id}`, { role: 'king' })).problem().kind).toBe(
      'bad-request',
    )
  })
})
