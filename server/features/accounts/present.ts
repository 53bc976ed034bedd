import type { Account, SessionEntry } from '../../../shared/api/accounts'
import { hasPassword, readUser } from '../../auth/repo'
import type { Tx } from '../../db/open'
import { Problem } from '../../http/problem'
import { deviceOf } from './deviceOf'
import type { SessionRow } from './repo'

/** @throws Problem not-signed-in for somebody whose account was deleted in this moment */
export function presentAccount(tx: Tx, userId: string): Account {
  const user = readUser(tx, userId)
  if (user === undefined) throw new Problem('not-signed-in')
  const { id, name, email, language, role } = user
  return { id, name, email, language, role, hasPassword: hasPassword(tx, userId) }
}

export function presentSession(row: SessionRow, current: string): SessionEntry {
  return {
    id: row.id,
    current: row.id === current,
    ...deviceOf(row.userAgent),
    address: row.ipAddress === null || row.ipAddress === '' ? null : shortAddress(row.ipAddress),
    createdAt: row.createdAt.toISOString(),
    usedAt: row.updatedAt.toISOString(),
  }
}

/** An IPv6 address as people write it (RFC 5952); better-auth keeps all its zeros. */
const shortAddress = (address: string): string =>
  address.includes(':') ? new URL(`http://[${address}]`).hostname.slice(1, -1) : address
