import { repeatedId } from './repeatedId'
import { GuideDocument, SCHEMA_VERSION } from './schema'

/**
 * A stored or sent document as one of this version. `newer`: it was written by a later version of the program, which alone can read it.
 * `not a document`: it does not say which version it is. `wrong`: it breaks its version's schema, or two nodes share an id; `errors`
 * name the places.
 */
export type ReadOutcome =
  | { ok: true; document: GuideDocument }
  | { ok: false; why: 'not a document' }
  | { ok: false; why: 'newer'; version: number; newest: number }
  | { ok: false; why: 'wrong'; errors: { path: (string | number)[]; message: string }[] }

type Stored = Readonly<Record<string, unknown>>

/**
 * From each version to the next: `UPGRADES[n]` takes a document of version n and gives one of n + 1. A pure function, which is never
 * changed once a document of that version may be stored; fixtures/documents keeps one of each for ever.
 */
const UPGRADES: Readonly<Record<number, (stored: Stored) => Stored>> = {}

/** Reads what claims to be a document: asks its version, upgrades it step by step, and checks the result. */
export function readDocument(json: unknown): ReadOutcome {
  const version = versionOf(json)
  if (version === undefined) return { ok: false, why: 'not a document' }
  if (version > SCHEMA_VERSION) return { ok: false, why: 'newer', version, newest: SCHEMA_VERSION }
  let stored = json as Stored
  for (let at = version; at < SCHEMA_VERSION; at += 1) stored = UPGRADES[at]!(stored)
  const parsed = GuideDocument.safeParse(stored)
  if (!parsed.success) {
    const errors = parsed.error.issues.map(({ path, message }) => ({
      path: path.map((key) => (typeof key === 'symbol' ? String(key) : key)),
      message,
    }))
    return { ok: false, why: 'wrong', errors }
  }
  const repeated = repeatedId(parsed.data)
  return repeated === undefined
    ? { ok: true, document: parsed.data }
    : {
        ok: false,
        why: 'wrong',
        errors: [{ path: [], message: `Two parts of the guide have the id ${repeated}.` }],
      }
}

/** The version that a document says it has: a whole number from 1. */
function versionOf(json: unknown): number | undefined {
  if (typeof json !== 'object' || json === null || !('schema' in json)) return undefined
  const { schema } = json
  return typeof schema === 'number' && Number.isInteger(schema) && schema >= 1 ? schema : undefined
}
