import type { Line } from '../../../../shared/guide/schema'
import type { NewId } from '../../../../shared/lib/ids/id'

/** A line of the parts list that so far has a name only. Its quantity is for reconciling with the steps. */
export function newLine(newId: NewId, name: string): Line {
  return {
    id: newId(),
    kind: 'bought',
    quantity: { value: '1', unit: 'each' },
    note: '',
    options: [
      {
        id: newId(),
        part: { key: '', name, specification: '' },
        regions: [],
        requires: [],
        excludes: [],
        sources: [],
      },
    ],
  }
}
