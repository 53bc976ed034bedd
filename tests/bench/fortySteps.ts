import type { GuideDocument, Step } from '../../shared/guide/schema'
import { writeGuide, type Stored } from '../../fixtures/demo/author'
import { generator } from '../../fixtures/demo/guides/generator'

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

/** A guide of 40 steps with the text of the demo's generator over and over, each time with ids of its own, and without pictures. */
export function fortySteps(): GuideDocument {
  const doc = writeGuide(generator('C'), noFiles)
  const section = doc.sections.flatMap(({ steps }) => steps).filter(({ when }) => when === undefined)
  const steps = Array.from({ length: 40 }, (_, index): Step => {
    const step = section[index % section.length]!
    const text = JSON.stringify({ ...step, figures: [], models: [] }).replace(
      /"id":"([^"]{1,34})[^"]*"/g,
      `"id":"$1-${index}xx"`,
    )
    return { ...(JSON.parse(text) as Step), title: `${step.title} (${index + 1})` }
  })
  return {
    ...doc,
    title: 'A guide of forty steps',
    front: null,
    figures: [],
    models: [],
    assets: [],
    sections: [0, 1, 2, 3].map((part) => ({
      id: `bench-section-${part}`,
      title: `Part ${part + 1}`,
      steps: steps.slice(part * 10, part * 10 + 10),
    })),
  }
}
