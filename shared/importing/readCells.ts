import { parse } from 'csv-parse/browser/esm/sync'

/** What stands between the cells: the candidate that gives the most rows of the same number of cells, more than one. */
export function separatorOf(text: string): ',' | ';' | '\t' | '|' {
  const sample = text.slice(0, 200_000)
  let best: { separator: ',' | ';' | '\t' | '|'; score: number } = { separator: ',', score: 0 }
  for (const separator of ['\t', ';', ',', '|'] as const) {
    const lengths = readWith(sample, separator)
      .slice(0, 200)
      .map((row) => row.length)
    const often = new Map<number, number>()
    for (const length of lengths) if (length > 1) often.set(length, (often.get(length) ?? 0) + 1)
    const score = Math.max(0, ...often.values()) / Math.max(1, lengths.length)
    if (score > best.score) best = { separator, score }
  }
  return best.separator
}

/** The cells of a text file. Quotation marks within a cell ("1.3" OLED") and rows of unequal length are taken as they are. */
export const readCells = (text: string): string[][] => readWith(text, separatorOf(text))

function readWith(text: string, separator: string): string[][] {
  const options = {
    delimiter: separator,
    bom: true,
    relax_column_count: true,
    skip_empty_lines: false,
    max_record_size: 1_000_000,
  }
  try {
    return parse(text, { ...options, relax_quotes: true })
  } catch (error) {
    // A quotation mark that is never closed swallows the rest; then marks are letters.
    if (!(error instanceof Error)) throw error
    return text
      .replace(/^\uFEFF/, '')
      .split(/\r\n|\n|\r/)
      .map((row) => row.split(separator))
  }
}
