import { Decimal } from '../../../../shared/guide/schema'

export type ReadDecimal = { ok: true; value: string | null } | { ok: false }

/** Digits of the scripts that the interface is written in, to the ones that a document holds. */
const LOCAL_DIGITS = /[\u0660-\u0669\u06f0-\u06f9]/g

/**
 * A number as a person types it: with a comma or a point, in Arabic digits too, without the nought ("5", ",5", "٥").
 * Empty is null.
 */
export function readDecimal(typed: string, { below0 = false, whole = false } = {}): ReadDecimal {
  const plain = typed
    .trim()
    .replace(LOCAL_DIGITS, (digit) => String(digit.charCodeAt(0) & 0xf))
    .replace(/[,\u066b]/, '.')
    .replace(/^\u2212/, '-')
    .replace(/^(-?)\./, '$10.')
    .replace(/\.$/, '')
  // One thousand here, one there: asking is better than guessing.
  if (/^[1-9]\d{0,2},\d{3}$/.test(typed.trim())) return { ok: false }
  if (plain === '') return { ok: true, value: null }
  if (!Decimal.safeParse(plain).success) return { ok: false }
  if (!below0 && plain.startsWith('-')) return { ok: false }
  if (whole && plain.includes('.')) return { ok: false }
  return { ok: true, value: plain }
}
