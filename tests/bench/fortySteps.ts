import type { GuideDocument, Step } from '../../shared/guide/schema'
import { writeGuide, type Stored } from '../../fixtures/demo/author'
import { dryer } from '../../fixtures/demo/guides/dryer'
import { generator } from '../../fixtures/demo/guides/generator'
import { grinder } from '../../fixtures/demo/guides/grinder'
import { pump } from '../../fixtures/demo/guides/pump'
import { stove } from '../../fixtures/demo/guides/stove'

const HASH = '0'.repeat(64)
const places = new Proxy({}, { get: () => ({ x: 5000, y: 5000 }) }) as Record<
  string,
  { x: number; y: number }
>
const nothing = { sha256: HASH, mediaType: 'image/svg+xml', bytes: 0, name: 'none' }
const noFiles: Stored = {
  figure: () => ({ ...nothing, anchors: places, balloons: places }),
  model: () => nothing,
}

/** A guide of 40 steps, each with a text of its own: those of the demo library's guides one after the other, without their pictures. */
export function fortySteps(): GuideDocument {
  const docs = [generator('C'), pump, dryer, grinder, stove].map((notes) => writeGuide(notes, noFiles))
  const all = docs
    .flatMap(({ sections }) => sections.flatMap(({ steps }) => steps))
    .filter(({ when }) => when === undefined)
  const steps = all.slice(0, 40).map((step): Step => ({ ...step, figures: [], models: [] }))
  if (steps.length < 40) throw new Error('The demo library has fewer than 40 steps.')
  const parts = [0, 10, 20, 30].map((from) => ({
    id: `bench-section-${from}`,
    title: `Part ${from / 10 + 1}`,
    steps: steps.slice(from, from + 10),
  }))
  return {
    ...docs[0]!,
    title: 'A guide of forty steps',
    front: null,
    figures: [],
    models: [],
    assets: [],
    lines: docs.flatMap(({ lines }) => lines),
    tools: docs.flatMap(({ tools }) => tools),
    sections: parts,
  }
}
