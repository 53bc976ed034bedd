import { readAsciiStl } from './readAsciiStl'
import { promisedFacets, readBinaryStl } from './readBinaryStl'
import { STL_FACET_BYTES, STL_HEADER_BYTES, type StlOutcome } from './stl'

export interface ReadStlOptions {
  /** More facets than this are refused before room is made for them. Default: no limit. */
  mostFacets?: number
}

/**
 * The triangles of an STL file, binary or text, in single precision as the format has it.
 * The stored normals are left aside: they are often wrong, and the order of the corners says the same.
 * A binary file whose 80-byte header begins with "solid" is known by its length; bytes after the promised facets are ignored.
 * Never throws on any bytes: what cannot be read is an outcome. Cost O(bytes).
 */
export function readStl(bytes: Uint8Array, options: ReadStlOptions = {}): StlOutcome {
  const limit = options.mostFacets ?? Number.MAX_SAFE_INTEGER
  if (looksBinary(bytes)) return readBinaryStl(bytes, limit)
  if (beginsWithSolid(bytes)) return readAsciiStl(bytes, limit)
  return readBinaryStl(bytes, limit)
}

/** The exact length tells a binary file, whatever its header says; failing that, a NUL byte where a text would have letters. */
function looksBinary(bytes: Uint8Array): boolean {
  if (bytes.length < STL_HEADER_BYTES) return false
  const promised = promisedFacets(bytes)
  if (bytes.length === STL_HEADER_BYTES + promised * STL_FACET_BYTES) return true
  return bytes.subarray(0, 1024).includes(0)
}

/** "solid" in any case after white space and, at most, a byte order mark. */
function beginsWithSolid(bytes: Uint8Array): boolean {
  const head = new TextDecoder('latin1').decode(bytes.subarray(0, 256))
  return /^(?:\xef\xbb\xbf)?\s*solid\b/i.test(head)
}
