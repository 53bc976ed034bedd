import type { Router } from 'express'
import { z } from 'zod'
import type { FilesAnswer } from '../../../../shared/api/files'
import { Sha256 } from '../../../../shared/lib/json/hash'
import { permitOnSite } from '../../../auth/person'
import type { Context } from '../../../context'
import { presentFile } from '../../../files/presentFile'
import { readFiles } from '../../../files/repo'
import { parseQuery } from '../../../http/parse'

const Query = z.object({
  sha256: z
    .string()
    .transform((list) => list.split(',').filter((hash) => hash !== ''))
    .pipe(
      z
        .array(Sha256)
        .min(1, 'Name the files by their hashes.')
        .max(200, 'Ask for at most 200 files at once.'),
    ),
})

/** GET /api/files?sha256=a,b,c: what is known of each; unknown ones are left out. */
export function look(router: Router, ctx: Context): void {
  router.get('/files', (req, res) => {
    permitOnSite(req, 'bring')
    const { sha256 } = parseQuery(Query, req)
    res.json({ files: readFiles(ctx.db, sha256).map(presentFile) } satisfies FilesAnswer)
  })
}
