import { afterAll, beforeAll, describe, expect, test } from 'vitest'
import { GuideEntry } from '../../shared/api/guides'
import {
  GUIDE_ROLES,
  mayOnGuide,
  mayOnSite,
  SITE_ROLES,
  type GuideAction,
  type Person,
} from '../../shared/access/ability'
import { readyDocument } from './readyDocument'
import { createTestSite, type Answer, type Client, type TestPerson, type TestSite } from './testSite'

/** Everybody who can ask: without an account, by site role without a role on the guide, by role on the guide. */
const WHO = ['reader', ...SITE_ROLES, ...GUIDE_ROLES.map((role) => `guide ${role}` as const)] as const
type Who = (typeof WHO)[number]

/** Who may do what to a guide that is not theirs or on which they have this one role. One table, asked twice: the rule and the site. */
const MAY: Record<GuideAction, readonly Who[]> = {
  see: ['reviewer', 'curator', 'guide owner', 'guide author', 'guide translator', 'guide reviewer'],
  edit: ['guide owner', 'guide author'],
  publish: ['guide owner'],
  manage: ['guide owner'],
  review: ['reviewer', 'guide reviewer'],
  translate: ['guide translator'],
  leave: ['guide owner', 'guide author', 'guide translator', 'guide reviewer'],
}

/** A request for each action, and what it answers to somebody who may. */
const ASK: {
  name: string
  action: GuideAction
  send: (client: Client, guideId: string) => Promise<Answer>
  ok: number
}[] = [
  {
    name: 'look at the draft',
    action: 'see',
    send: (client, id) => client.get(`/api/guides/${id}/draft`),
    ok: 200,
  },
  {
    name: 'say that one is here',
    action: 'see',
    send: (client, id) => client.post(`/api/guides/${id}/draft/here`, { step: null }),
    ok: 200,
  },
  {
    name: 'list the revisions',
    action: 'see',
    send: (client, id) => client.get(`/api/guides/${id}/revisions`),
    ok: 200,
  },
  {
    name: 'save the draft',
    action: 'edit',
    send: (client, id) =>
      client.put(`/api/guides/${id}/draft`, { document: readyDocument('Saved') }, { 'if-match': '"1"' }),
    ok: 200,
  },
  // There is no such conflict: to somebody who may settle, that is what the site says.
  {
    name: 'settle a conflict',
    action: 'edit',
    send: (client, id) => client.post(`/api/guides/${id}/draft/conflicts/none`, { keep: 'mine' }),
    ok: 404,
  },
  // An empty draft is never ready: the site says so to those who may publish.
  {
    name: 'publish',
    action: 'publish',
    send: (client, id) =>
      client.post(`/api/guides/${id}/revisions`, { label: 'A', note: 'x' }, { 'if-match': '"1"' }),
    ok: 409,
  },
  {
    name: 'remove the guide',
    action: 'manage',
    send: (client, id) => client.delete(`/api/guides/${id}`),
    ok: 204,
  },
]

let site: TestSite
let owner: TestPerson
beforeAll(async () => {
  site = await createTestSite()
  owner = site.person()
})
afterAll(() => site.close())

const newGuide = async (): Promise<string> =>
  (await site.as(owner).post('/api/guides', { title: 'Pump', lang: 'en' })).read(GuideEntry).id

function as(who: Who, guideId: string): Client {
  if (who === 'reader') return site.as(null)
  const siteRole = SITE_ROLES.find((role) => role === who)
  const person = site.person(siteRole ?? 'member')
  const guideRole = GUIDE_ROLES.find((role) => `guide ${role}` === who)
  if (guideRole !== undefined) site.give(person, guideId, guideRole, guideRole === 'translator' ? 'ar' : '')
  return site.as(person)
}

function personAs(who: Who): Person | null {
  if (who === 'reader') return null
  const guideRole = GUIDE_ROLES.find((role) => `guide ${role}` === who)
  return {
    id: 'somebody',
    role: SITE_ROLES.find((role) => role === who) ?? 'member',
    guides: guideRole === undefined ? [] : [{ guideId: 'one', role: guideRole, language: '' }],
  }
}

describe('the rule', () => {
  test.each(Object.keys(MAY) as GuideAction[])('%s', (action) => {
    expect(WHO.filter((who) => mayOnGuide(personAs(who), action, 'one'))).toEqual(
      WHO.filter((who) => MAY[action].includes(who)),
    )
    // A role on one guide gives nothing on another.
    expect(
      WHO.filter((who) => who.startsWith('guide') && mayOnGuide(personAs(who), action, 'other')),
    ).toEqual([])
  })

  test('on the site', () => {
    const everybodyWithAccount = WHO.filter((who) => who !== 'reader')
    expect(WHO.filter((who) => mayOnSite(personAs(who), 'start'))).toEqual(everybodyWithAccount)
    expect(WHO.filter((who) => mayOnSite(personAs(who), 'bring'))).toEqual(everybodyWithAccount)
    expect(WHO.filter((who) => mayOnSite(personAs(who), 'curate'))).toEqual(['curator'])
  })
})

describe.each(ASK)('$name', ({ action, send, ok }) => {
  test.each(WHO)('as %s', async (who) => {
    const guideId = await newGuide()
    const answer = await send(as(who, guideId), guideId)
    if (MAY[action].includes(who)) expect(answer.status).toBe(ok)
    else if (who === 'reader') expect(answer.problem()).toMatchObject({ status: 401, kind: 'not-signed-in' })
    // Those who may not even see the draft do not learn that there is one.
    else if (MAY.see.includes(who))
      expect(answer.problem()).toMatchObject({ status: 403, kind: 'not-allowed' })
    else expect(answer.problem()).toMatchObject({ status: 404, kind: 'not-found' })
    if (!MAY[action].includes(who)) {
      const untouched = await site.as(owner).get(`/api/guides/${guideId}/draft`)
      expect(untouched.etag).toBe('"1"')
    }
  })
})

test('without an account: no guide is started, no file brought in or asked for, no list', async () => {
  const reader = site.as(null)
  const answers = [
    await reader.post('/api/guides', { title: 'Pump', lang: 'en' }),
    await reader.get('/api/guides'),
    await reader.upload('/api/files', [{ name: 'a.png', bytes: 'x' }]),
    await reader.get(`/api/files?sha256=${'0'.repeat(64)}`),
  ]
  expect(answers.map((answer) => answer.problem().kind)).toEqual(Array(4).fill('not-signed-in'))
})

test('a cookie with another signature is nobody’s', async () => {
  const forged = {
    ...owner,
    cookie: owner.cookie.replace(/\.[^.]+$/, `.${encodeURIComponent('A'.repeat(43) + '=')}`),
  }
  expect((await site.as(forged).get('/api/guides')).problem().kind).toBe('not-signed-in')
})

test('a write that another site’s page sends is nobody’s', async () => {
  const answer = await site
    .as(owner)
    .post('/api/guides', { title: 'x', lang: 'en' }, { 'sec-fetch-site': 'cross-site' })
  expect(answer.problem().kind).toBe('not-signed-in')
})
