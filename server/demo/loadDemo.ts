import { writeFile } from 'node:fs/promises'
import path from 'node:path'
import sharp from 'sharp'
import { writeGuide, type Stored, type StoredFile } from '../../fixtures/demo/author'
import { library, people } from '../../fixtures/demo/library'
import { demoFigures, type DemoFigure } from '../../fixtures/demo/models/demoFigures'
import { demoParts } from '../../fixtures/demo/models/demoParts'
import { DEMO_PASSWORD } from '../../shared/access/demoAddress'
import { GuideDocument } from '../../shared/guide/schema'
import { addAccount } from '../auth/addAccount'
import type { Context } from '../context'
import { bringFile } from '../files/bringFile'
import { insertFile, putRendition, setFileState } from '../files/repo'
import { freeSlug, insertDocument, insertGuide, putDraft } from '../guides/repo'
import { insertRevision, putSearch } from '../guides/revisionRepo'
import { slugOf } from '../guides/slugOf'
import { addMember } from './repo'

const SVG = 'image/svg+xml'
/** Paper and ink of the light theme: a picture for other sites cannot follow a theme. */
const PAPER = '#fbfaf5'

/**
 * Loads the invented demo library into a site without people: accounts, files, guides with their revisions as they were published. Called
 * once, before the first request, with the handlers of all jobs in place. A load that was cut off before the accounts begins anew at the
 * next start; files are put in once by their hash.
 */
export async function loadDemo(ctx: Context): Promise<void> {
  ctx.log.info('loading the demo library')
  const figures = new Map<string, StoredFile & DemoFigure>()
  for (const figure of await demoFigures())
    figures.set(figure.name, { ...figure, ...(await storeFigure(ctx, figure)) })
  const models = await storeModels(ctx)
  const stored: Stored = {
    figure: (drawing) => named(figures, drawing),
    model: (part) => named(models, part),
  }
  const ids = new Map<string, string>()
  for (const [key, person] of Object.entries(people)) {
    ids.set(key, await addAccount(ctx, { ...person, password: DEMO_PASSWORD }))
  }
  for (const guide of library) {
    ctx.db.transaction((tx) => {
      const ownerId = named(ids, guide.owner)
      const guideId = ctx.newId()
      guide.revisions.forEach((revision, index) => {
        const at = new Date(`${revision.at}T09:00:00Z`)
        const document = GuideDocument.parse(writeGuide(revision.notes, stored))
        if (index === 0) {
          insertGuide(
            tx,
            { id: guideId, slug: freeSlug(tx, slugOf(document.title)), byline: guide.byline, createdAt: at },
            ownerId,
          )
        }
        const documentHash = insertDocument(tx, document, at)
        putDraft(tx, { guideId, documentHash, version: index + 1, updatedBy: ownerId, updatedAt: at })
        insertRevision(tx, {
          id: ctx.newId(),
          guideId,
          number: index + 1,
          label: revision.label,
          documentHash,
          changeClass: revision.changeClass,
          note: revision.note,
          publishedByName: people[guide.owner]!.name,
          publishedBy: ownerId,
          publishedAt: at,
        })
        putSearch(tx, guideId, document)
      })
      for (const { who, role, language = '' } of guide.others) {
        addMember(tx, { guideId, userId: named(ids, who), role, language, createdAt: ctx.now() })
      }
    })
  }
}

function named<Value>(values: ReadonlyMap<string, Value>, name: string): Value {
  const value = values.get(name)
  if (value === undefined) throw new Error(`The demo library has no ${name}.`)
  return value
}

/** A drawing of the site's own making: the SVG itself, and a raster for what cannot show one. */
async function storeFigure(ctx: Context, figure: DemoFigure): Promise<StoredFile> {
  const bytes = Buffer.from(figure.svg)
  const sha256 = await ctx.storage.keepBytes(bytes)
  const raster = await sharp(bytes, { density: 144 })
    .resize({ width: 960 })
    .flatten({ background: PAPER })
    .webp()
    .toBuffer({ resolveWithObject: true })
  const webp = await ctx.storage.keepBytes(raster.data)
  const { width, height, name } = figure
  const file = { sha256, mediaType: SVG, bytes: bytes.length, name: `${name}.svg` }
  ctx.db.transaction((tx) => {
    insertFile(tx, { ...file, kind: 'picture', state: 'working', uploadedBy: null, createdAt: ctx.now() })
    putRendition(tx, {
      sha256,
      name: 'still',
      file: sha256,
      mediaType: SVG,
      bytes: bytes.length,
      width,
      height,
    })
    putRendition(tx, {
      sha256,
      name: 'webp-960',
      file: webp,
      mediaType: 'image/webp',
      bytes: raster.data.length,
      width: raster.info.width,
      height: raster.info.height,
    })
    setFileState(tx, sha256, {
      state: 'ready',
      facts: JSON.stringify({ width: Math.round(width), height: Math.round(height) }),
    })
  })
  return file
}

async function storeModels(ctx: Context): Promise<Map<string, StoredFile>> {
  const wanted = new Set(
    library.flatMap(({ revisions }) =>
      revisions.flatMap(({ notes }) => Object.values(notes.models).map(({ part }) => part)),
    ),
  )
  const models = new Map<string, StoredFile>()
  for (const part of await demoParts()) {
    if (!wanted.has(part.name)) continue
    const temporary = path.join(ctx.storage.temporaryDir, `${part.name}.stl`)
    await writeFile(temporary, part.stl)
    const brought = await bringFile(ctx, null, {
      path: temporary,
      name: `${part.name}.stl`,
      bytes: part.stl.length,
    })
    if (!brought.ok) throw new Error(`${part.name}: ${brought.sentence}`)
    const { sha256, mediaType, bytes, name } = brought.file
    models.set(part.name, { sha256, mediaType, bytes, name })
  }
  return models
}
