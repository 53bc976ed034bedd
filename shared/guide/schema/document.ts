import { z } from 'zod'
import { Id } from '../../lib/ids/id'
import { LanguageTag } from '../../lib/language/direction'
import { Caution } from './caution'
import { Asset, Claim, Figure, Model, Sheet } from './figure'
import { Line } from './line'
import { Section, Tool } from './step'
import { Line1, Sentences } from './text'

export const SCHEMA_VERSION = 1

/** What a machine is for; `other` until somebody needs a kind of its own. */
export const MachineKind = z.enum([
  'water-power',
  'wind-power',
  'pump',
  'dryer',
  'grinder',
  'stove',
  'press',
  'workshop-tool',
  'robot',
  'instrument',
  'other',
])
export type MachineKind = z.infer<typeof MachineKind>

/**
 * A guide as one value. Everything that a reader, a comparison or a translation can point at has a lasting id. What is derived
 * (numbers, balloons, totals) and what is not the guide's own (labels, prices, translations, builds) is not in it.
 */
export const GuideDocument = z.object({
  schema: z.literal(SCHEMA_VERSION),
  lang: LanguageTag,
  title: Line1,
  summary: Sentences,
  machine: MachineKind,
  /** SPDX identifier; empty until the designer chooses one, which readiness asks for. */
  licence: z.string().max(80),
  credits: z.array(z.object({ id: Id, name: Line1, role: Line1 })).max(200),
  /** The figure of the front page. */
  front: Id.nullable(),
  cautions: z.array(Caution).max(30),
  skills: z.array(z.object({ id: Id, name: Line1 })).max(60),
  sections: z.array(Section).max(200),
  lines: z.array(Line).max(2000),
  tools: z.array(Tool).max(500),
  figures: z.array(Figure).max(3000),
  models: z.array(Model).max(1000),
  claims: z.array(Claim).max(100),
  sheets: z.array(Sheet).max(30),
  assets: z.array(Asset).max(5000),
})
export type GuideDocument = z.infer<typeof GuideDocument>
