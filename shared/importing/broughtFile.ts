/** A file that was brought, after its bytes were judged. `path` is relative, with `/` between folders. */
export type BroughtFile =
  | { path: string; kind: 'text'; text: string }
  /** A workbook: each sheet's cells as text, formulas by their results, a merged cell once. */
  | { path: string; kind: 'sheets'; sheets: { name: string; cells: string[][] }[] }
  | { path: string; kind: 'picture'; sha256: string }
  | { path: string; kind: 'model'; sha256: string }
  /** `why` is a sentence. */
  | { path: string; kind: 'unused'; why: string }
