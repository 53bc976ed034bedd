import type { LineKind, Option } from '../../../../shared/guide/schema'
import type { NewId } from '../../../../shared/lib/ids/id'

/** A substitute of which nothing is said yet. */
export const newOption = (newId: NewId, kind: LineKind): Option => ({
  id: newId(),
  part: { key: '', name: '', specification: '' },
  regions: [],
  requires: [],
  excludes: [],
  sources: [],
  ...(kind === 'printed' && {
    print: { model: null, material: '', layer: null, walls: null, infill: null, supports: null },
  }),
})
