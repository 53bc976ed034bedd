import type { Id } from '../lib/ids/id'

/** Where in the draft a finding is: enough for the drafting page to go there. All null is the guide itself. */
export interface FindingPlace {
  /** The step to open, or 'guide' for the front matter, 'parts' for the parts list. */
  page: 'guide' | 'parts' | 'step'
  step: Id | null
  /** The node within it, and its field, to focus. */
  node: Id | null
  field: string | null
}

/** Something that must (or should) be mended before publishing, named by its rule; `values` fill the sentence in any language. */
export interface Finding {
  rule: string
  must: boolean
  place: FindingPlace
  values: Record<string, string | number>
}
