import { hashPassword } from 'better-auth/crypto'
import type { SiteRole } from '../../shared/access/ability'
import type { Context } from '../context'
import { insertUser } from './repo'

/**
 * Makes an account that is confirmed already, without a mail: for the demo library and for tests. @returns its id.
 */
export async function addAccount(
  ctx: Context,
  account: { name: string; email: string; password: string; role?: SiteRole; language?: string },
): Promise<string> {
  const id = ctx.newId()
  const now = ctx.now()
  const hash = await hashPassword(account.password)
  ctx.db.transaction((tx) =>
    insertUser(
      tx,
      {
        id,
        name: account.name,
        email: account.email.toLowerCase(),
        emailVerified: true,
        role: account.role ?? 'member',
        language: account.language ?? 'en',
        createdAt: now,
        updatedAt: now,
      },
      hash,
      ctx.newId(),
    ),
  )
  return id
}
