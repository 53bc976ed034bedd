import { eq } from 'drizzle-orm'
import type { Person } from '../../shared/access/ability'
import type { Tx } from '../db/open'
import { guideMembers, users } from '../db/schema'

export interface SignedIn extends Person {
  name: string
  email: string
  language: string
}

/** A person with the roles held on guides, read anew for every request so that a role taken away is gone at once. */
export function readPerson(tx: Tx, userId: string): SignedIn | undefined {
  const user = tx.select().from(users).where(eq(users.id, userId)).get()
  if (user === undefined) return undefined
  const held = tx.select().from(guideMembers).where(eq(guideMembers.userId, userId)).all()
  return {
    id: user.id,
    role: user.role,
    name: user.name,
    email: user.email,
    language: user.language,
    guides: held.map(({ guideId, role, language }) => ({ guideId, role, language })),
  }
}
