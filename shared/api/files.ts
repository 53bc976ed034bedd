import { z } from 'zod'
import { Sha256 } from '../lib/json/hash'

/** What is made from a file: "webp-480", "webp-960", "webp-1600", "avif-960", "glb", "still", "still-png". */
export const Rendition = z.object({
  name: z.string(),
  mediaType: z.string(),
  bytes: z.number().int(),
  width: z.number().int().nullable(),
  height: z.number().int().nullable(),
})
export type Rendition = z.infer<typeof Rendition>

/** Size of a picture as it is seen, after its rotation was applied. */
export const PictureFacts = z.object({ width: z.number().int(), height: z.number().int() })
export type PictureFacts = z.infer<typeof PictureFacts>

/** Measures of a model in the file's own unit of length, which an STL does not name. Filled in by server/meshes. */
export const ModelFacts = z.object({
  triangles: z.number().int(),
  volume: z.number(),
  area: z.number(),
  box: z.object({ x: z.number(), y: z.number(), z: z.number() }),
  closed: z.boolean(),
  shells: z.number().int(),
  openEdges: z.number().int(),
  backwardsEdges: z.number().int(),
  nonManifoldEdges: z.number().int(),
  degenerateFacets: z.number().int(),
  previewErrorRatio: z.number(),
})
export type ModelFacts = z.infer<typeof ModelFacts>

/** A file that was brought in. `facts` is null while it is being worked on; `trouble` is a sentence where it failed. */
export const FileEntry = z.object({
  sha256: Sha256,
  kind: z.enum(['picture', 'model']),
  mediaType: z.string(),
  bytes: z.number().int(),
  name: z.string(),
  state: z.enum(['working', 'ready', 'failed']),
  trouble: z.string().nullable(),
  picture: PictureFacts.nullable(),
  model: ModelFacts.nullable(),
  renditions: z.array(Rendition),
})
export type FileEntry = z.infer<typeof FileEntry>

/** POST /api/files (multipart, field "files"): each file is judged by itself; a refused one has a sentence and harms no other. */
export const UploadAnswer = z.object({
  files: z.array(FileEntry),
  refused: z.array(z.object({ name: z.string(), sentence: z.string() })),
})
export type UploadAnswer = z.infer<typeof UploadAnswer>

/** GET /api/files?sha256=a,b,c: what is known of each; unknown ones are left out. */
export const FilesAnswer = z.object({ files: z.array(FileEntry) })
export type FilesAnswer = z.infer<typeof FilesAnswer>

/** The address of a rendition, or of the file itself (models only: a picture as uploaded is never served, for what its EXIF says). */
export const fileAddress = (sha256: string, rendition?: string): string =>
  rendition === undefined ? `/files/${sha256}` : `/files/${sha256}/${rendition}`
