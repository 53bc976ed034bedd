import { rm } from 'node:fs/promises'
import type { Router } from 'express'
import type { UploadAnswer } from '../../../../shared/api/files'
import { permitOnSite } from '../../../auth/person'
import type { Context } from '../../../context'
import { bringFile, LARGEST, tooLarge } from '../../../files/bringFile'
import { receiveFiles } from '../../../files/receiveFiles'
import { Problem } from '../../../http/problem'

const MOST = 100

/** POST /api/files: each file is judged by itself; 422 when none was taken. */
export function bring(router: Router, ctx: Context): void {
  router.post('/files', async (req, res) => {
    const person = permitOnSite(req, 'bring')
    const received = await receiveFiles(ctx, req, res, { most: MOST, bytes: LARGEST.model })
    if (received.length === 0) {
      throw new Problem('bad-request', {}, [{ path: ['files'], message: 'Choose a file to bring in.' }])
    }
    const answer: UploadAnswer = { files: [], refused: [] }
    try {
      for (const file of received) {
        const brought = file.tooLarge
          ? ({ ok: false, sentence: tooLarge(LARGEST.model) } as const)
          : await bringFile(ctx, person.id, file)
        if (!brought.ok) answer.refused.push({ name: file.name, sentence: brought.sentence })
        else if (!answer.files.some(({ sha256 }) => sha256 === brought.file.sha256))
          answer.files.push(brought.file)
      }
    } finally {
      // Where the disk failed at one of them, the ones after it are still there.
      await Promise.all(received.map((file) => rm(file.path, { force: true })))
    }
    if (answer.files.length === 0) throw allRefused(answer.refused)
    res.json(answer)
  })
}

function allRefused(refused: UploadAnswer['refused']): Problem {
  return new Problem(
    'bad-file',
    { sentence: refused.map(({ name, sentence }) => `${name}: ${sentence}`).join(' ') },
    refused.map(({ name, sentence }, at) => ({ path: ['files', at, name], message: sentence })),
  )
}
