import { z } from 'zod'
import { GUIDE_ROLES, SITE_ROLES } from '../access/ability'
import { LanguageTag } from '../lib/language/direction'
import { Email } from './accounts'

/** How long an invitation holds, in days. */
export const INVITATION_DAYS = 14

/** A role on a guide. A translator's names the language; every other has none. */
export const RoleOnGuide = z
  .object({ role: z.enum(GUIDE_ROLES), language: z.union([LanguageTag, z.literal('')]).default('') })
  .refine(({ role, language }) => (role === 'translator') === (language !== ''), {
    path: ['language'],
    message: 'Say into which language, for translators only.',
  })
export type RoleOnGuide = z.infer<typeof RoleOnGuide>

export const GuidePerson = z.object({
  userId: z.string(),
  name: z.string(),
  /** For owners only, else null. */
  email: z.string().nullable(),
  roles: z.array(z.object({ role: z.enum(GUIDE_ROLES), language: z.string() })),
})
export type GuidePerson = z.infer<typeof GuidePerson>

/** An invitation that waits or has run out. */
export const InvitationEntry = z.object({
  id: z.string(),
  email: z.string(),
  role: z.enum(GUIDE_ROLES),
  language: z.string(),
  createdAt: z.iso.datetime(),
  expiresAt: z.iso.datetime(),
  expired: z.boolean(),
})
export type InvitationEntry = z.infer<typeof InvitationEntry>

/** GET /api/guides/:guideId/people; the answer of every change to it. `invitations` is empty for everybody but owners. */
export const GuidePeople = z.object({
  guideId: z.string(),
  title: z.string(),
  people: z.array(GuidePerson),
  invitations: z.array(InvitationEntry),
  mayManage: z.boolean(),
  mayLeave: z.boolean(),
})
export type GuidePeople = z.infer<typeof GuidePeople>

/** POST /api/guides/:guideId/invitations. An open one for the same address and role is replaced. */
export const Invite = z.intersection(z.object({ email: Email }), RoleOnGuide)
export type Invite = z.infer<typeof Invite>

/** PATCH /api/guides/:guideId/people/:userId: one role becomes another. DELETE takes all, `/people/me` is leaving. */
export const ChangeRole = z.object({ from: RoleOnGuide, to: RoleOnGuide })
export type ChangeRole = z.infer<typeof ChangeRole>

/** POST /api/invitations/read {token}: what it is for; asked without an account too. The token stays out of addresses and logs. */
export const ReadInvitation = z.object({ token: z.string().min(1).max(200) })
export const Invitation = z.object({
  guideTitle: z.string(),
  invitedBy: z.string().nullable(),
  email: z.string(),
  role: z.enum(GUIDE_ROLES),
  language: z.string(),
  state: z.enum(['open', 'accepted', 'withdrawn', 'expired']),
})
export type Invitation = z.infer<typeof Invitation>

/**
 * POST /api/invitations/accept, signed in. Refused as other-address where it went to another address, until `otherAddress` says
 * that this is meant.
 */
export const AcceptInvitation = ReadInvitation.extend({ otherAddress: z.boolean().default(false) })
export const AcceptedInvitation = z.object({ guideId: z.string() })

/** GET /api/people?search=…&cursor=…: all accounts, for curators. */
export const PeopleQuery = z.object({
  search: z.string().trim().max(200).default(''),
  cursor: z.string().max(100).optional(),
})
export const SitePerson = z.object({
  id: z.string(),
  name: z.string(),
  email: z.string(),
  role: z.enum(SITE_ROLES),
  confirmed: z.boolean(),
  guides: z.number().int(),
  createdAt: z.iso.datetime(),
})
export type SitePerson = z.infer<typeof SitePerson>
export const SitePeople = z.object({ people: z.array(SitePerson), next: z.string().nullable() })
export type SitePeople = z.infer<typeof SitePeople>

/** PATCH /api/people/:userId, by a curator; never for oneself. */
export const ChangeSiteRole = z.object({ role: z.enum(SITE_ROLES) })
