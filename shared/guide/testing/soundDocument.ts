import type { Facts, FileFacts } from '../facts'
import type { GuideDocument, Line, Option } from '../schema'

/** Invented: a small guide in which readiness finds nothing, for tests that break one thing at a time. */
export const PHOTO = 'a'.repeat(64)
export const SOLID = 'b'.repeat(64)

const option = (id: string, name: string): Option => ({
  id,
  part: { key: '', name, specification: `${name}, steel` },
  regions: [],
  requires: [],
  excludes: [],
  sources: [],
})
const line = (id: string, name: string, value: string, more: Partial<Line> = {}): Line => ({
  id,
  kind: 'bought',
  quantity: { value, unit: 'each' },
  note: '',
  options: [option(`${id}-option`, name)],
  ...more,
})

export function soundDocument(): GuideDocument {
  return {
    schema: 1,
    lang: 'en',
    title: 'Test stand',
    summary: 'Holds a wheel so that it can be turned by hand.',
    machine: 'other',
    licence: 'CERN-OHL-S-2.0',
    credits: [],
    front: 'figure-front',
    cautions: [
      {
        id: 'caution-guide',
        signal: 'warning',
        hazard: 'The wheel turns.',
        avoid: 'Keep fingers away.',
        wear: ['M009'],
      },
    ],
    skills: [],
    sections: [
      {
        id: 'section-one-1',
        title: 'Frame',
        steps: [
          {
            id: 'step-bolts-01',
            title: 'Bolt the frame',
            body: {
              type: 'doc',
              content: [
                {
                  type: 'paragraph',
                  attrs: { id: 'paragraph-001' },
                  content: [
                    { type: 'text', text: 'Put in the ' },
                    { type: 'balloon', attrs: { line: 'line-bolt-001' } },
                    { type: 'text', text: ' as in ' },
                    { type: 'figureRef', attrs: { figure: 'figure-bolts' } },
                    { type: 'text', text: ', then go on with ' },
                    { type: 'stepRef', attrs: { step: 'step-wheel-01' } },
                  ],
                },
              ],
            },
            uses: [{ id: 'use-bolt-0001', line: 'line-bolt-001', quantity: { value: '8', unit: 'each' } }],
            tools: ['tool-wrench-1'],
            cautions: [
              {
                id: 'caution-step-1',
                signal: 'caution',
                hazard: 'Sharp edges.',
                avoid: 'Deburr them.',
                wear: [],
              },
            ],
            checks: [
              {
                id: 'check-gap-001',
                text: 'The gap',
                measure: { unit: 'mm', atLeast: '0.8', atMost: '1.2', oneSided: false },
              },
            ],
            figures: ['figure-bolts'],
            models: ['model-wheel-1'],
            minutes: 10,
            people: 1,
          },
          {
            id: 'step-wheel-01',
            title: 'Fit the wheel',
            body: {
              type: 'doc',
              content: [
                {
                  type: 'paragraph',
                  attrs: { id: 'paragraph-002' },
                  content: [{ type: 'text', text: 'Push it on.' }],
                },
              ],
            },
            uses: [{ id: 'use-wheel-001', line: 'line-wheel-01', quantity: { value: '1', unit: 'each' } }],
            tools: [],
            cautions: [],
            checks: [],
            figures: ['figure-wheel'],
            models: [],
            minutes: 5,
            people: 1,
          },
        ],
      },
    ],
    lines: [
      line('line-bolt-001', 'Bolt M8', '8'),
      line('line-wheel-01', 'Wheel', '1', {
        kind: 'printed',
        options: [
          {
            ...option('option-wheel', 'Wheel'),
            print: {
              model: 'model-wheel-1',
              material: 'PETG',
              layer: null,
              walls: 3,
              infill: 40,
              supports: false,
            },
          },
          option('option-cast-1', 'Cast wheel'),
        ],
      }),
    ],
    tools: [{ id: 'tool-wrench-1', name: 'Wrench 13 mm' }],
    figures: ['front', 'bolts', 'wheel'].map((name) => ({
      id: `figure-${name}`,
      kind: 'photo',
      asset: PHOTO,
      caption: `The ${name}`,
      alt: `The ${name} from the front`,
      callouts:
        name === 'bolts'
          ? [
              {
                id: 'callout-bolt1',
                shape: 'balloon',
                line: 'line-bolt-001',
                at: { x: 10, y: 20 },
                tip: null,
              },
            ]
          : [],
    })),
    models: [{ id: 'model-wheel-1', asset: SOLID, name: 'Wheel', unit: 'mm', material: 'PETG' }],
    claims: [
      {
        id: 'claim-power-1',
        label: 'Power',
        quantity: { value: '5', unit: 'W' },
        conditions: 'by hand',
        evidence: { kind: 'bench run', text: 'Run 1' },
      },
    ],
    sheets: [],
    assets: [
      { sha256: PHOTO, mediaType: 'image/jpeg', bytes: 10, name: 'photo.jpg' },
      { sha256: SOLID, mediaType: 'model/stl', bytes: 10, name: 'wheel.stl' },
    ],
  }
}

const file: FileFacts = { kind: 'picture', state: 'ready', name: 'photo.jpg', trouble: null, model: null }
const SOUND_SOLID = {
  closed: true,
  openEdges: 0,
  backwardsEdges: 0,
  nonManifoldEdges: 0,
  degenerateFacets: 0,
}

/** The two files of the sound document, ready; `change` says otherwise of one. */
export function soundFacts(change: { photo?: Partial<FileFacts>; solid?: Partial<FileFacts> } = {}): Facts {
  return {
    files: new Map([
      [PHOTO, { ...file, ...change.photo }],
      [SOLID, { ...file, kind: 'model', name: 'wheel.stl', model: SOUND_SOLID, ...change.solid }],
    ]),
  }
}
