import type { FindingPlace } from '../../../../shared/guide/finding'
import type { Id } from '../../../../shared/lib/ids/id'

/** The addresses of the places in a draft: each can be linked to. */
export const draftAddress = (guideId: string): string => `/drafts/${guideId}`
export const stepAddress = (guideId: string, stepId: Id): string => `/drafts/${guideId}/steps/${stepId}`
export const partsAddress = (guideId: string): string => `/drafts/${guideId}/parts`
export const guideAddress = (guideId: string): string => `/drafts/${guideId}/guide`
/** Who works on it: a page of its own, outside of the draft's frame. */
export const peopleAddress = (guideId: string): string => `/drafts/${guideId}/people`
export const publishAddress = (guideId: string): string => `/drafts/${guideId}/publish`
export const previewAddress = (guideId: string): string => `/drafts/${guideId}/preview`

/** A node of the draft and a field in it, as the address has them: `?node=…&field=…`. */
export function placeQuery(node: Id | null, field: string | null): string {
  const query = new URLSearchParams()
  if (node !== null) query.set('node', node)
  if (field !== null) query.set('field', field)
  return query.size === 0 ? '' : `?${query.toString()}`
}

/** Where a finding is to be mended. */
export function findingAddress(guideId: string, { page, step, node, field }: FindingPlace): string {
  const at =
    page === 'step' && step !== null
      ? stepAddress(guideId, step)
      : page === 'parts'
        ? partsAddress(guideId)
        : guideAddress(guideId)
  return at + placeQuery(node, field)
}
