import type { Request } from 'express'
import { permitOnSite } from '../../auth/person'
import type { SignedIn } from '../../auth/repo'
import type { Context } from '../../context'
import { Problem } from '../../http/problem'
import { readImport, type ImportRow } from './repo'

/** An import is its owner's alone. @throws Problem not-found for anybody else. */
export function ownImport(ctx: Context, req: Request, id: string): { person: SignedIn; row: ImportRow } {
  const person = permitOnSite(req, 'bring')
  const row = readImport(ctx.db, id)
  if (row === undefined || row.userId !== person.id) throw new Problem('not-found')
  return { person, row }
}
