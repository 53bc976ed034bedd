import { z } from 'zod'

/**
 * The lasting id of a node: given once, at random, and kept through edits, moves, revisions, forks and translations.
 * 12 to 40 characters, letters, digits, `-` and `_`, so that it can stand in an address and in an XML id.
 */
export const Id = z.string().regex(/^[A-Za-z][A-Za-z0-9_-]{11,39}$/, 'An id has 12 to 40 letters and digits.')
export type Id = z.infer<typeof Id>

/** Makes ids; handed in, because nothing in `shared` draws by chance. */
export type NewId = () => Id
