import { emptyDocument } from '../../shared/guide/emptyDocument'
import type { GuideDocument } from '../../shared/guide/schema'
import { newId } from '../../server/context'

/** A small guide that nothing keeps from being published. */
export function readyDocument(title: string): GuideDocument {
  const empty = emptyDocument(newId, { lang: 'en', title, machine: 'pump', sectionTitle: 'Pipe' })
  const line = newId()
  const section = empty.sections[0]!
  return {
    ...empty,
    summary: 'Lifts water from a well of ten metres with a rope and rubber washers.',
    licence: 'CERN-OHL-S-2.0',
    sections: [
      {
        ...section,
        steps: section.steps.map((step) => ({
          ...step,
          title: 'Cut the pipe',
          body: {
            type: 'doc',
            content: [
              {
                type: 'paragraph',
                attrs: { id: newId() },
                content: [{ type: 'text', text: 'Saw it square and break the edge.' }],
              },
            ],
          },
          uses: [{ id: newId(), line, quantity: { value: '2', unit: 'm' } }],
          minutes: 10,
        })),
      },
    ],
    lines: [
      {
        id: line,
        kind: 'bought',
        quantity: { value: '2', unit: 'm' },
        note: '',
        options: [
          {
            id: newId(),
            part: { key: '', name: 'Pressure pipe', specification: 'PVC-U, 25 mm, PN 10' },
            regions: [],
            requires: [],
            excludes: [],
            sources: [],
          },
        ],
      },
    ],
  }
}
