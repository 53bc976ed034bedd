import { mkdtemp, rm } from 'node:fs/promises'
import path from 'node:path'
import type { Context } from '../context'
import type { MadeFile } from '../meshes/types'
import type { MadePicture } from '../pictures/types'
import { putRendition, readFile, setFileState, type RenditionRow } from './repo'

interface Payload {
  sha256: string
}
const ATTEMPTS = 4
const DAMAGED = 'This picture is damaged and cannot be read to its end. Save it again and bring that.'
const GIVEN_UP = 'The site could not work on this file. Bring it in again, or tell the curator.'

/** What is made of a file after it has arrived. WebP first, so that a page has the picture within a second; AVIF when there is time. */
export function handleFileJobs(ctx: Context): void {
  const giveUp = ({ sha256 }: Payload): void =>
    setFileState(ctx.db, sha256, { state: 'failed', trouble: GIVEN_UP })
  ctx.jobs.handle<Payload>('picture', (job) => workOnPicture(ctx, job.sha256), { attempts: ATTEMPTS, giveUp })
  ctx.jobs.handle<Payload>('model', (job) => workOnModel(ctx, job.sha256), { attempts: ATTEMPTS, giveUp })
  ctx.jobs.handle<Payload>('small-picture', (job) => makeSmaller(ctx, job.sha256), { attempts: ATTEMPTS })
}

async function workOnPicture(ctx: Context, sha256: string): Promise<void> {
  await inFolder(ctx, async (outDir) => {
    const file = ctx.storage.pathOf(sha256)
    const made = await ctx.workers.run('makePicture', { file, outDir, format: 'webp' })
    if (!made.ok) {
      setFileState(ctx.db, sha256, { state: 'failed', trouble: DAMAGED })
      return
    }
    const rows = await keep(ctx, sha256, made.made)
    const facts = JSON.stringify({ width: made.width, height: made.height })
    ctx.db.transaction((tx) => {
      if (readFile(tx, sha256) === undefined) return
      for (const row of rows) putRendition(tx, row)
      setFileState(tx, sha256, { state: 'ready', facts, trouble: null })
      ctx.jobs.add(tx, 'small-picture', { sha256 }, { key: `small-picture ${sha256}`, rank: 5 })
    })
  })
}

async function makeSmaller(ctx: Context, sha256: string): Promise<void> {
  await inFolder(ctx, async (outDir) => {
    const file = ctx.storage.pathOf(sha256)
    const made = await ctx.workers.run('makePicture', { file, outDir, format: 'avif' })
    if (!made.ok) throw new Error('A picture that was read once cannot be read again.')
    const rows = await keep(ctx, sha256, made.made)
    ctx.db.transaction((tx) => {
      if (readFile(tx, sha256) === undefined) return
      for (const row of rows) putRendition(tx, row)
    })
  })
}

async function workOnModel(ctx: Context, sha256: string): Promise<void> {
  await inFolder(ctx, async (outDir) => {
    const outcome = await ctx.workers.run('analyseModel', { file: ctx.storage.pathOf(sha256), outDir })
    if (!outcome.ok) {
      setFileState(ctx.db, sha256, { state: 'failed', trouble: outcome.sentence })
      return
    }
    const rows = await keep(ctx, sha256, outcome.made)
    ctx.db.transaction((tx) => {
      if (readFile(tx, sha256) === undefined) return
      for (const row of rows) putRendition(tx, row)
      setFileState(tx, sha256, { state: 'ready', facts: JSON.stringify(outcome.facts), trouble: null })
    })
  })
}

/** Stores what was made. Done again it stores the same bytes, which are one file. */
async function keep(
  ctx: Context,
  sha256: string,
  made: readonly (MadeFile | MadePicture)[],
): Promise<RenditionRow[]> {
  const rows: RenditionRow[] = []
  for (const { name, file, mediaType, bytes, width, height } of made) {
    rows.push({ sha256, name, file: await ctx.storage.keepFile(file), mediaType, bytes, width, height })
  }
  return rows
}

async function inFolder(ctx: Context, work: (outDir: string) => Promise<void>): Promise<void> {
  const outDir = await mkdtemp(path.join(ctx.storage.temporaryDir, 'made-'))
  try {
    await work(outDir)
  } finally {
    await rm(outDir, { recursive: true, force: true })
  }
}
