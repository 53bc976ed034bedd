/** Triangles one after the other, nine numbers each, as an STL holds them: no vertex is shared yet. */
export interface StlSoup {
  ok: true
  kind: 'binary' | 'ascii'
  positions: Float32Array
  facets: number
}

/** Why a file is not taken, with the numbers that a person needs to go on. Facets and lines are counted from 1. */
export type StlRefusal =
  | { ok: false; why: 'not-stl' }
  | { ok: false; why: 'no-facets' }
  /** `promised` is null for a text file, which does not say beforehand how many facets it holds. */
  | { ok: false; why: 'truncated'; promised: number | null; present: number }
  | { ok: false; why: 'not-finite'; facet: number }
  | { ok: false; why: 'bad-text'; line: number; found: string }
  | { ok: false; why: 'too-many'; facets: number; limit: number }

export type StlOutcome = StlSoup | StlRefusal

/** A binary STL: 80 bytes of anything, the number of facets, then 50 bytes each (normal, three corners, an unused number). */
export const STL_HEADER_BYTES = 84
export const STL_FACET_BYTES = 50
