import { STL_FACET_BYTES, STL_HEADER_BYTES, type StlOutcome } from './stl'

/** Facets that are looked at to tell a damaged STL from a file of another kind. */
const SAMPLE = 16
/** Sizes between which a coordinate is believed; bytes of another meaning seldom fall between them twelve times running. */
const SMALLEST = 1e-20
const LARGEST = 1e12

/** More facets make a file of 7.5 GB. Any four letters of a text, read as a number, are more. */
const MOST_PROMISED = 0x09090909

/** Facets that the header of a binary STL promises. `bytes` has at least the header's length. */
export function promisedFacets(bytes: Uint8Array): number {
  return new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength).getUint32(80, true)
}

/**
 * The triangles of a binary STL.
 * `not-stl` when the bytes make no sense as facets; `truncated` when they do, and fewer are there than the header promises.
 * Cost O(facets); at most 36 bytes of memory a facet beside the input.
 */
export function readBinaryStl(bytes: Uint8Array, limit: number): StlOutcome {
  if (bytes.length < STL_HEADER_BYTES) return { ok: false, why: 'not-stl' }
  const promised = promisedFacets(bytes)
  const present = Math.floor((bytes.length - STL_HEADER_BYTES) / STL_FACET_BYTES)
  if (promised === 0) return { ok: false, why: bytes.length === STL_HEADER_BYTES ? 'no-facets' : 'not-stl' }
  const whole = present === promised && bytes.length === STL_HEADER_BYTES + promised * STL_FACET_BYTES
  if (promised > MOST_PROMISED) return { ok: false, why: 'not-stl' }
  if (!whole && !isPlausible(bytes, Math.min(present, promised))) return { ok: false, why: 'not-stl' }
  if (present < promised) return { ok: false, why: 'truncated', promised, present }
  if (promised > limit) return { ok: false, why: 'too-many', facets: promised, limit }
  const positions = copyCorners(bytes, promised)
  const wrong = firstNotFinite(positions)
  if (wrong >= 0) return { ok: false, why: 'not-finite', facet: Math.floor(wrong / 9) + 1 }
  return { ok: true, kind: 'binary', positions, facets: promised }
}

/**
 * The corners without the normals and the unused number, copied as 16-bit words: a facet is 50 bytes long, so only every second
 * one lies where a Float32Array could look at it.
 */
function copyCorners(bytes: Uint8Array, facets: number): Float32Array {
  const even = bytes.byteOffset % 2 === 0 ? bytes : bytes.slice()
  const words = new Uint16Array(even.buffer, even.byteOffset, even.byteLength >> 1)
  const positions = new Float32Array(facets * 9)
  const out = new Uint16Array(positions.buffer)
  let to = 0
  let from = (STL_HEADER_BYTES + 12) >> 1
  for (let facet = 0; facet < facets; facet++) {
    for (let word = 0; word < 18; word++) out[to + word] = words[from + word]!
    to += 18
    from += STL_FACET_BYTES >> 1
  }
  return positions
}

function firstNotFinite(positions: Float32Array): number {
  for (let index = 0; index < positions.length; index++) {
    const value = positions[index]!
    // A difference with itself is 0 for every finite number and NaN for the others.
    if (value - value !== 0) return index
  }
  return -1
}

function isPlausible(bytes: Uint8Array, facets: number): boolean {
  if (facets === 0) return false
  const view = new DataView(bytes.buffer, bytes.byteOffset, bytes.byteLength)
  for (let facet = 0; facet < Math.min(facets, SAMPLE); facet++) {
    const start = STL_HEADER_BYTES + facet * STL_FACET_BYTES + 12
    for (let corner = 0; corner < 9; corner++) {
      const size = Math.abs(view.getFloat32(start + corner * 4, true))
      if (Number.isFinite(size) && size !== 0 && (size < SMALLEST || size > LARGEST)) return false
    }
  }
  return true
}
