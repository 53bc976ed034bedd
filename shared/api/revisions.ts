import { z } from 'zod'

export const ChangeClass = z.enum(['wording', 'interchangeable', 'not interchangeable'])
export type ChangeClass = z.infer<typeof ChangeClass>

/** POST /api/guides/:guideId/revisions with If-Match: the draft becomes the next revision. The first one has no change class. */
export const PublishRevision = z.object({
  label: z
    .string()
    .trim()
    .min(1, 'Give the revision a label, such as A.')
    .max(20)
    .regex(/^[\p{L}\p{N}][\p{L}\p{N}.-]*$/u, 'A label has letters, digits, points and hyphens.'),
  note: z.string().trim().min(1, 'Say in a sentence what changed and why.').max(4000),
  changeClass: ChangeClass.nullable().default(null),
})
export type PublishRevision = z.infer<typeof PublishRevision>

export const RevisionEntry = z.object({
  id: z.string(),
  number: z.number().int(),
  label: z.string(),
  note: z.string(),
  changeClass: ChangeClass.nullable(),
  documentHash: z.string(),
  publishedByName: z.string(),
  publishedAt: z.iso.datetime(),
  /** Its address for ever: /guides/<slug>/revisions/<label>. */
  address: z.string(),
})
export type RevisionEntry = z.infer<typeof RevisionEntry>

/** GET /api/guides/:guideId/revisions, newest first. */
export const RevisionPage = z.object({ revisions: z.array(RevisionEntry), next: z.string().nullable() })
export type RevisionPage = z.infer<typeof RevisionPage>
