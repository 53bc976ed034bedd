import { existsSync } from 'node:fs'
import { understand } from '../../../shared/importing/understand'
import type { Context } from '../../context'
import { readArrived, type Arrived } from './readArrived'
import { readImport, setImport } from './repo'
import { BadZip } from './unpack'

export interface ImportJob {
  id: string
  arrived: Arrived[]
}

const GIVEN_UP = 'The site could not read these files. Bring them again, or tell the curator.'
const RESTARTED = 'The site was started anew while it read these files. Bring them again.'

/** Reads what was brought. A restart in the middle loses the temporary files, and is said so. */
export function handleImportJobs(ctx: Context): void {
  const fail = (id: string, trouble: string): void =>
    setImport(ctx.db, id, { state: 'failed', trouble, updatedAt: ctx.now() })
  ctx.jobs.handle<ImportJob>(
    'understand-import',
    async ({ id, arrived }) => {
      const row = readImport(ctx.db, id)
      if (row?.state !== 'reading') return
      if (!arrived.every(({ file }) => existsSync(file))) return fail(id, RESTARTED)
      try {
        const tell = (done: number, total: number, now: string): void =>
          setImport(ctx.db, id, {
            understanding: JSON.stringify({ progress: { done, total, now } }),
            updatedAt: ctx.now(),
          })
        const understanding = understand(await readArrived(ctx, row.userId, arrived, tell))
        setImport(ctx.db, id, {
          state: 'understood',
          understanding: JSON.stringify(understanding),
          updatedAt: ctx.now(),
        })
      } catch (error) {
        if (!(error instanceof BadZip)) throw error
        fail(id, error.message)
      }
    },
    { attempts: 2, giveUp: ({ id }) => fail(id, GIVEN_UP) },
  )
}
