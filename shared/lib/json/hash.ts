import { sha256 } from '@noble/hashes/sha2.js'
import { bytesToHex, utf8ToBytes } from '@noble/hashes/utils.js'
import canonicalize from 'canonicalize'
import { z } from 'zod'

/** A SHA-256 in lower-case hexadecimal. */
export const Sha256 = z.string().regex(/^[0-9a-f]{64}$/, 'A SHA-256 has 64 hexadecimal digits.')
export type Sha256 = z.infer<typeof Sha256>

/**
 * Canonical JSON after RFC 8785: the same value always gives the same text, whatever the order of its keys.
 * @throws Error for what JSON or UTF-8 cannot hold (NaN, infinities, undefined at the root, half a surrogate pair) and for what goes in
 * circles: a programmer's error, since the schema keeps all of these out.
 */
export function canonicalJson(value: unknown): string {
  const text = canonicalize(value)
  if (text === undefined) throw new TypeError('This value has no JSON.')
  return text
}

/** SHA-256 of the value's canonical JSON: the identity of a document. */
export function hashOf(value: unknown): Sha256 {
  return bytesToHex(sha256(utf8ToBytes(canonicalJson(value))))
}
