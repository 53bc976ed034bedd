import { randomUUID } from 'node:crypto'
import { createWriteStream } from 'node:fs'
import { rm } from 'node:fs/promises'
import path from 'node:path'
import type { Readable } from 'node:stream'
import { pipeline } from 'node:stream/promises'
import type { Request, Response } from 'express'
import multer, { MulterError, type StorageEngine } from 'multer'
import type { Context } from '../context'
import { Problem } from '../http/problem'
import type { ArrivedFile } from './bringFile'

/** One that is larger than the limit has been read to its end and thrown away, so that the others arrive. */
export interface ReceivedFile extends ArrivedFile {
  tooLarge: boolean
}

/**
 * Receives the files of a form (field "files") into the storage's temporary folder, as a stream: a large file costs no memory.
 * @throws Problem bad-request for more files than `most`, or for what is no form.
 */
export async function receiveFiles(
  ctx: Context,
  req: Request,
  res: Response,
  limits: { most: number; bytes: number; fieldBytes?: number },
): Promise<ReceivedFile[]> {
  const received: ReceivedFile[] = []
  const form = multer({
    storage: toTemporary(ctx.storage.temporaryDir, limits.bytes, received),
    limits: {
      files: limits.most,
      fields: 20,
      fieldSize: limits.fieldBytes ?? 10_000,
      fieldNameSize: 100,
      parts: limits.most + 20,
    },
    defParamCharset: 'utf8',
  }).array('files')
  try {
    await new Promise<void>((resolve, reject) => {
      void form(req, res, (error: unknown) => {
        if (error === undefined || error === null) resolve()
        else reject(error instanceof Error ? error : new Error(String(error)))
      })
    })
    return received
  } catch (error) {
    await Promise.all(received.map((file) => rm(file.path, { force: true })))
    throw asProblem(error, limits.most)
  }
}

function toTemporary(folder: string, limit: number, received: ReceivedFile[]): StorageEngine {
  return {
    _handleFile: (_req, file, done) => {
      const target = path.join(folder, randomUUID())
      write(file.stream, target, limit).then(
        ({ bytes, tooLarge }) => {
          received.push({ path: target, name: file.originalname, bytes, tooLarge })
          done(null, { path: target, size: bytes })
        },
        (error: unknown) => {
          void rm(target, { force: true }).finally(() => done(error))
        },
      )
    },
    _removeFile: (_req, file, done) => {
      rm(file.path, { force: true }).then(
        () => done(null),
        (error: unknown) => done(error instanceof Error ? error : new Error(String(error))),
      )
    },
  }
}

async function write(
  from: Readable,
  target: string,
  limit: number,
): Promise<{ bytes: number; tooLarge: boolean }> {
  let bytes = 0
  await pipeline(
    from,
    async function* (chunks: AsyncIterable<Buffer>) {
      for await (const chunk of chunks) {
        bytes += chunk.length
        if (bytes <= limit) yield chunk
      }
    },
    createWriteStream(target, { flags: 'wx' }),
  )
  if (bytes > limit) await rm(target, { force: true })
  return { bytes, tooLarge: bytes > limit }
}

function asProblem(error: unknown, most: number): unknown {
  if (!(error instanceof Error)) return error
  if (error instanceof MulterError) {
    const message =
      error.code === 'LIMIT_FILE_COUNT' || error.code === 'LIMIT_PART_COUNT'
        ? `Bring at most ${most} files at once.`
        : 'Send the files in the field “files” of a form.'
    return new Problem('bad-request', {}, [{ path: ['files'], message }], { cause: error })
  }
  // What busboy says of a form that breaks off or is none.
  if (
    /unexpected end of form|malformed part|boundary not found|request aborted|unexpected end of file/i.test(
      error.message,
    )
  ) {
    return new Problem(
      'bad-request',
      {},
      [{ path: ['files'], message: 'The form broke off. Send it again.' }],
      {
        cause: error,
      },
    )
  }
  return error
}
