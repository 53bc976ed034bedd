import ExcelJS from 'exceljs'

const MOST_ROWS = 3000
const MOST_COLUMNS = 200

/** The sheets of an XLSX as text: formulas by their results, a merged cell once, links as `[text](address)`. @throws Error for what is none. */
export async function readWorkbook(file: string): Promise<{ name: string; cells: string[][] }[]> {
  const workbook = new ExcelJS.Workbook()
  await workbook.xlsx.readFile(file)
  return workbook.worksheets.map((sheet) => {
    const cells: string[][] = []
    const rows = Math.min(sheet.rowCount, MOST_ROWS)
    const columns = Math.min(sheet.columnCount, MOST_COLUMNS)
    for (let at = 1; at <= rows; at += 1) {
      const row = sheet.getRow(at)
      cells.push(Array.from({ length: columns }, (_, index) => textOf(row.getCell(index + 1))))
    }
    return { name: sheet.name, cells }
  })
}

function textOf(cell: ExcelJS.Cell): string {
  if (cell.isMerged && cell.master.address !== cell.address) return ''
  return valueText(cell.value)
}

function valueText(value: ExcelJS.CellValue): string {
  if (value === null || value === undefined) return ''
  if (value instanceof Date) return value.toISOString().slice(0, 10)
  if (typeof value === 'number') return String(Math.round(value * 1e6) / 1e6)
  if (typeof value !== 'object') return String(value)
  if ('richText' in value) return value.richText.map(({ text }) => text).join('')
  if ('hyperlink' in value) {
    const text = valueText(value.text as ExcelJS.CellValue).trim()
    return /^https?:/i.test(value.hyperlink) && text !== value.hyperlink
      ? `[${text}](${value.hyperlink})`
      : value.hyperlink || text
  }
  if ('result' in value) return valueText(value.result as ExcelJS.CellValue)
  return ''
}
