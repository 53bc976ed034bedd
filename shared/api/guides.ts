import { z } from 'zod'
import { GUIDE_ROLES } from '../access/ability'
import { MachineKind } from '../guide/schema'
import { LanguageTag } from '../lib/language/direction'

/** POST /api/guides: a new guide with an empty draft, owned by who asks. */
export const StartGuide = z.object({
  title: z.string().trim().min(1, 'Give the guide a title.').max(300),
  lang: LanguageTag,
  machine: MachineKind.default('other'),
})
export type StartGuide = z.infer<typeof StartGuide>

export const GuideEntry = z.object({
  id: z.string(),
  slug: z.string(),
  title: z.string(),
  byline: z.string(),
  roles: z.array(z.enum(GUIDE_ROLES)),
  version: z.number().int(),
  updatedAt: z.iso.datetime(),
  updatedByName: z.string().nullable(),
  latest: z.object({ label: z.string(), publishedAt: z.iso.datetime() }).nullable(),
})
export type GuideEntry = z.infer<typeof GuideEntry>

/** GET /api/guides?cursor=…: the drafts that the person works on, the last changed first. */
export const GuidePage = z.object({ guides: z.array(GuideEntry), next: z.string().nullable() })
export type GuidePage = z.infer<typeof GuidePage>
