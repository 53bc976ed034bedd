import { mayOnGuide } from '../../../shared/access/ability'
import type { GuidePeople, GuidePerson, InvitationEntry, SitePerson } from '../../../shared/api/people'
import type { Permitted } from '../../auth/person'
import type { Tx } from '../../db/open'
import { Problem } from '../../http/problem'
import { listInvitations, listMembers, readDraftJson, type InvitationRow, type SitePersonRow } from './repo'

/** The people of a guide as this person may see them: addresses and invitations are for owners. */
export function presentPeople(tx: Tx, { guideId, person }: Permitted<'see'>, now: Date): GuidePeople {
  const mayManage = mayOnGuide(person, 'manage', guideId)
  const people = new Map<string, GuidePerson>()
  for (const { userId, name, email, role, language } of listMembers(tx, guideId)) {
    const known = people.get(userId) ?? { userId, name, email: mayManage ? email : null, roles: [] }
    known.roles.push({ role, language })
    people.set(userId, known)
  }
  return {
    guideId,
    title: titleOf(tx, guideId),
    people: [...people.values()],
    invitations: mayManage ? listInvitations(tx, guideId).map((row) => presentInvitation(row, now)) : [],
    mayManage,
    mayLeave: mayOnGuide(person, 'leave', guideId),
  }
}

function presentInvitation(row: InvitationRow, now: Date): InvitationEntry {
  const { id, email, role, language, createdAt, expiresAt } = row
  return {
    id,
    email,
    role,
    language,
    createdAt: createdAt.toISOString(),
    expiresAt: expiresAt.toISOString(),
    expired: expiresAt <= now,
  }
}

/** @throws Problem not-found for a guide without a draft */
export function titleOf(tx: Tx, guideId: string): string {
  const json = readDraftJson(tx, guideId)
  if (json === undefined) throw new Problem('not-found')
  const { title } = JSON.parse(json) as { title: string }
  return title
}

export function presentSitePerson(row: SitePersonRow): SitePerson {
  const { id, name, email, role, guides } = row
  return {
    id,
    name,
    email,
    role,
    confirmed: row.emailVerified,
    guides,
    createdAt: row.createdAt.toISOString(),
  }
}
