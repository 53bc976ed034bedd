import list from 'spdx-license-list/simple.js'

/** Whether this is a licence's identifier of the SPDX list (12 KB of names; loaded only where drafts are judged). */
export const isLicence = (id: string): boolean => list.has(id)
