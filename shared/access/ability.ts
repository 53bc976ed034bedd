import { AbilityBuilder, createMongoAbility, subject, type MongoAbility } from '@casl/ability'

export const SITE_ROLES = ['member', 'reviewer', 'curator'] as const
export type SiteRole = (typeof SITE_ROLES)[number]
export const GUIDE_ROLES = ['owner', 'author', 'translator', 'reviewer'] as const
export type GuideRole = (typeof GUIDE_ROLES)[number]

/** Somebody who is signed in, with the roles held on guides. */
export interface Person {
  id: string
  role: SiteRole
  guides: readonly { guideId: string; role: GuideRole; language: string }[]
}

/**
 * What can be asked. On a guide: `see` its draft, `edit` it, `publish` it, `manage` its people, `review` it, `translate` it, `leave` it.
 * On the site: `start` a guide, `bring` files in, `curate` the library (mail, accounts). On an account: `keep` it (one's own).
 */
export type GuideAction = 'see' | 'edit' | 'publish' | 'manage' | 'review' | 'translate' | 'leave'
export type SiteAction = 'start' | 'bring' | 'curate'
type Subjects =
  | 'Guide'
  | 'Site'
  | 'Account'
  | { __caslSubjectType__: 'Guide'; id: string }
  | { __caslSubjectType__: 'Account'; id: string }
export type Ability = MongoAbility<[GuideAction | SiteAction | 'keep', Subjects]>

const MAY: Record<GuideRole, readonly GuideAction[]> = {
  owner: ['see', 'edit', 'publish', 'manage', 'leave'],
  author: ['see', 'edit', 'leave'],
  translator: ['see', 'translate', 'leave'],
  reviewer: ['see', 'review', 'leave'],
}

/** Everything that a person may do, in one place. Null is a reader without an account: published guides need no permission. */
export function abilityFor(person: Person | null): Ability {
  const { can, build } = new AbilityBuilder<Ability>(createMongoAbility)
  if (person !== null) {
    can(['start', 'bring'], 'Site')
    can('keep', 'Account', { id: person.id })
    for (const held of person.guides) can([...MAY[held.role]], 'Guide', { id: held.guideId })
    if (person.role === 'reviewer') can(['see', 'review'], 'Guide')
    if (person.role === 'curator') {
      can('curate', 'Site')
      can('see', 'Guide')
    }
  }
  // CASL takes `manage` for every action unless told otherwise; here it is what the owner does with a guide's people.
  return build({ anyAction: 'every action' })
}

/** Whether a person may do this to this guide. */
export function mayOnGuide(person: Person | null, action: GuideAction, guideId: string): boolean {
  return abilityFor(person).can(action, subject('Guide', { id: guideId }))
}

/** Whether a person may do this on the site. */
export function mayOnSite(person: Person | null, action: SiteAction): boolean {
  return abilityFor(person).can(action, 'Site')
}
