/**
 * Rows and cells of a block that a spreadsheet put on the clipboard: tabs between cells, line ends between rows, a cell with a tab, a line end or a
 * quotation mark in quotation marks, which it doubles (as RFC 4180 does for commas). A mark inside of a plain cell is a mark: `1/2" bolt`.
 */
export function readTsv(text: string): string[][] {
  const rows: string[][] = [[]]
  let at = 0
  while (at <= text.length) {
    const { cell, end } = text[at] === '"' ? quoted(text, at) : plain(text, at)
    rows.at(-1)!.push(cell)
    if (end >= text.length) break
    if (text[end] !== '\t') rows.push([])
    at = end + (text.startsWith('\r\n', end) ? 2 : 1)
  }
  // The last row ends with a line end too.
  if (rows.length > 1 && rows.at(-1)!.join('') === '') rows.pop()
  return rows
}

function plain(text: string, from: number): { cell: string; end: number } {
  const end = text.slice(from).search(/[\t\r\n]/)
  return end === -1
    ? { cell: text.slice(from), end: text.length }
    : { cell: text.slice(from, from + end), end: from + end }
}

function quoted(text: string, from: number): { cell: string; end: number } {
  let at = from + 1
  let cell = ''
  for (;;) {
    const mark = text.indexOf('"', at)
    if (mark === -1) return plain(text, from) // It never closes, so it was no quotation.
    cell += text.slice(at, mark)
    if (text[mark + 1] !== '"') {
      const after = mark + 1
      // Closed in the middle of a cell: it was part of the words, as in `"A" type`.
      return after >= text.length || /[\t\r\n]/.test(text[after]!) ? { cell, end: after } : plain(text, from)
    }
    cell += '"'
    at = mark + 2
  }
}

/** Cells as a spreadsheet takes them from the clipboard. */
export function writeTsv(rows: readonly (readonly string[])[]): string {
  return rows
    .map((row) =>
      row.map((cell) => (/[\t\r\n]|^"/.test(cell) ? `"${cell.replace(/"/g, '""')}"` : cell)).join('\t'),
    )
    .join('\n')
}
