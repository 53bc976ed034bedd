import { linesOfTable } from './linesOfTable'
import { columnsOf, judgeRows } from './readTable'
import type { Understanding, UnderstoodTable } from './understanding'

/**
 * After a person changed what a table's columns mean, where its headings are or whether it is wanted: its lines are read anew. Lines
 * of other tables stay as they were edited. Uses of lines that are gone go with them.
 */
export function readTablesAnew(before: Understanding, after: Understanding): Understanding {
  const old = new Map(before.tables.map((table) => [table.key, table]))
  const changed = new Map<string, UnderstoodTable>()
  for (const table of after.tables) {
    const was = old.get(table.key)
    if (was !== undefined && isChanged(was, table)) changed.set(table.key, judged(was, table))
  }
  if (changed.size === 0) return after
  const tables = after.tables.map((table) => changed.get(table.key) ?? table)
  const modelOf = new Map(after.lines.map((line) => [line.key, line.modelKey]))
  const lines = tables.flatMap((table) =>
    changed.has(table.key)
      ? linesOfTable(table).map(({ line }) => withModel(line, modelOf.get(line.key) ?? null))
      : after.lines.filter((line) => line.tableKey === table.key),
  )
  const kept = [
    ...lines,
    ...after.lines.filter((line) => line.tableKey === null || !old.has(line.tableKey)),
  ].slice(0, 2000)
  const keys = new Set(kept.map(({ key }) => key))
  return {
    ...after,
    tables,
    lines: kept,
    models: after.models.map((model) =>
      model.lineKey === null || keys.has(model.lineKey) ? model : { ...model, lineKey: null },
    ),
    sections: after.sections.map((section) => ({
      ...section,
      steps: section.steps.map((step) => ({
        ...step,
        uses: step.uses.filter(({ lineKey }) => keys.has(lineKey)),
      })),
    })),
  }
}

const withModel = <T extends { kind: string; modelKey: string | null }>(
  line: T,
  modelKey: string | null,
): T => (modelKey === null ? line : { ...line, modelKey, kind: 'printed' })

const isChanged = (was: UnderstoodTable, now: UnderstoodTable): boolean =>
  was.include !== now.include || was.headingRow !== now.headingRow || columnsKey(was) !== columnsKey(now)

const columnsKey = (table: UnderstoodTable): string =>
  JSON.stringify(table.columns.map(({ index, meaning }) => [index, meaning]))

/** Another row of headings gives other columns, unless the person said what the columns are as well. */
function judged(was: UnderstoodTable, now: UnderstoodTable): UnderstoodTable {
  const moved = was.headingRow !== now.headingRow && columnsKey(was) === columnsKey(now)
  const heading = now.headingRow === null ? undefined : now.rows[now.headingRow]?.cells
  const columns =
    moved && heading !== undefined
      ? columnsOf(
          heading,
          now.rows.map(({ cells }) => cells),
        )
      : now.columns
  return judgeRows({ ...now, columns })
}
