import { describe, expect, test } from 'vitest'
import { GUIDE_ROLES, mayOnGuide, mayOnSite, type GuideAction, type Person, type SiteAction } from './ability'

const ACTIONS: GuideAction[] = ['see', 'edit', 'publish', 'manage', 'review', 'translate', 'leave']
const SITE_ACTIONS: SiteAction[] = ['start', 'bring', 'curate']

const person = (role: Person['role'], guides: Person['guides'] = []): Person => ({ id: 'p', role, guides })
const onGuide = (who: Person | null, guideId = 'pump') =>
  ACTIONS.filter((action) => mayOnGuide(who, action, guideId)).join(' ')
const onSite = (who: Person | null) => SITE_ACTIONS.filter((action) => mayOnSite(who, action)).join(' ')

describe('on a guide', () => {
  test.each([
    ['owner', 'see edit publish manage leave'],
    ['author', 'see edit leave'],
    ['translator', 'see translate leave'],
    ['reviewer', 'see review leave'],
  ] as const)('a %s may: %s', (role, expected) => {
    const held = person('member', [{ guideId: 'pump', role, language: role === 'translator' ? 'ar' : '' }])
    expect(onGuide(held)).toBe(expected)
    expect(onGuide(held, 'stove')).toBe('')
  })

  test.each([
    ['member', ''],
    ['reviewer', 'see review'],
    ['curator', 'see'],
  ] as const)('without a role on it, a %s of the site may: %s', (role, expected) => {
    expect(onGuide(person(role))).toBe(expected)
  })

  test('roles add up', () => {
    const guides = GUIDE_ROLES.map((role) => ({ guideId: 'pump', role, language: '' }))
    expect(onGuide(person('member', guides))).toBe(ACTIONS.join(' '))
  })

  test('a reader without an account may nothing', () => {
    expect(onGuide(null)).toBe('')
  })
})

test.each([
  [null, ''],
  ['member', 'start bring'],
  ['reviewer', 'start bring'],
  ['curator', 'start bring curate'],
] as const)('on the site, %s may: %s', (role, expected) => {
  expect(onSite(role === null ? null : person(role))).toBe(expected)
})
