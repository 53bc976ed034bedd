import { rm } from 'node:fs/promises'
import type { Request, Router } from 'express'
import { z } from 'zod'
import { IMPORT_LIMITS, type ImportStarted } from '../../../../shared/api/imports'
import { permit, permitOnSite } from '../../../auth/person'
import type { Context } from '../../../context'
import { receiveFiles, type ReceivedFile } from '../../../files/receiveFiles'
import { Problem } from '../../../http/problem'
import type { ImportJob } from '../handleImportJobs'
import { insertImport } from '../repo'
import { isUnsafe } from '../unpack'

const Fields = z.object({ paths: z.string().optional(), guideId: z.string().max(40).optional() })
const Paths = z.array(z.string().min(1).max(1000))

/** POST /api/imports: files with their relative paths → 202; they are read by a job. */
export function bring(router: Router, ctx: Context): void {
  router.post('/imports', async (req, res) => {
    const person = permitOnSite(req, 'bring')
    const files = await receiveFiles(ctx, req, res, {
      most: IMPORT_LIMITS.files,
      bytes: IMPORT_LIMITS.fileBytes,
      fieldBytes: 1_000_000,
    })
    const received = inOrder(req, files)
    try {
      if (received.length === 0) throw refuse('files', 'Choose the files, or a ZIP of them.')
      const large = received.find(({ tooLarge }) => tooLarge)
      if (large !== undefined)
        throw new Problem('too-large', { limit: `${IMPORT_LIMITS.fileBytes / 1024 ** 2} MB` })
      const fields = Fields.parse(req.body ?? {})
      const guideId = fields.guideId === undefined || fields.guideId === '' ? null : fields.guideId
      if (guideId !== null) permit(req, 'edit', guideId)
      const paths = pathsOf(fields.paths, received)
      const id = ctx.newId()
      const now = ctx.now()
      const arrived = received.map(({ path, bytes }, at) => ({ path: paths[at]!, file: path, bytes }))
      ctx.db.transaction((tx) => {
        insertImport(tx, { id, userId: person.id, guideId, state: 'reading', createdAt: now, updatedAt: now })
        ctx.jobs.add(tx, 'understand-import', { id, arrived } satisfies ImportJob, { key: `import ${id}` })
      })
      res
        .status(202)
        .location(`/api/imports/${id}`)
        .json({ id } satisfies ImportStarted)
    } catch (error) {
      await Promise.all(received.map(({ path }) => rm(path, { force: true })))
      throw error
    }
  })
}

/** As they stand in the form: a small file may be written before a larger one ahead of it. */
function inOrder(req: Request, received: readonly ReceivedFile[]): ReceivedFile[] {
  const files = Array.isArray(req.files) ? req.files : []
  const places = new Map(files.map((file, at) => [file.path, at]))
  return received.toSorted((a, b) => (places.get(a.path) ?? 0) - (places.get(b.path) ?? 0))
}

/** The path of each file; without them its name. Files arrive in the order of the form, and so do the paths. */
function pathsOf(field: string | undefined, received: readonly ReceivedFile[]): string[] {
  if (field === undefined || field === '') return received.map(({ name }) => name)
  const read = Paths.safeParse(asJson(field))
  if (!read.success || read.data.length !== received.length)
    throw refuse('paths', 'Give one path for each file.')
  const paths = read.data.map((path) => path.replace(/\\/g, '/').normalize('NFC'))
  if (paths.some(isUnsafe)) throw refuse('paths', 'A path may not lead out of the folder that is brought.')
  return paths
}

function asJson(text: string): unknown {
  try {
    return JSON.parse(text)
  } catch (error) {
    throw new Problem(
      'bad-request',
      {},
      [{ path: ['paths'], message: 'Give the paths as a list in JSON.' }],
      { cause: error },
    )
  }
}

const refuse = (field: string, message: string): Problem =>
  new Problem('bad-request', {}, [{ path: [field], message }])
