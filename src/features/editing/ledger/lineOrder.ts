import { moveNode, setNode } from '../../../../shared/guide/edit'
import type { GuideDocument, Line } from '../../../../shared/guide/schema'
import type { Id } from '../../../../shared/lib/ids/id'

/** How deep a line lies in sub-assemblies. A circle, which nobody makes on purpose, counts as far as it goes. */
export function depthOf(lines: ReadonlyMap<Id, Line>, line: Line): number {
  const seen = new Set<Id>([line.id])
  let depth = 0
  for (let at = line; at.within !== undefined && !seen.has(at.within); depth += 1) {
    const outer = lines.get(at.within)
    if (outer === undefined) break
    seen.add(outer.id)
    at = outer
  }
  return depth
}

/** Puts a line into the sub-assembly of the line before it: beside what already lies there, or as its first. */
export function nestDeeper(doc: GuideDocument, id: Id): GuideDocument {
  const lines = new Map(doc.lines.map((line) => [line.id, line]))
  const index = doc.lines.findIndex((line) => line.id === id)
  const line = doc.lines[index]
  if (line === undefined) return doc
  const depth = depthOf(lines, line)
  // The nearest line above on the same level is what it goes into; one that is deeper lies in that already.
  for (let above = index - 1; above >= 0; above -= 1) {
    const other = doc.lines[above]!
    const otherDepth = depthOf(lines, other)
    if (otherDepth === depth) return setNode(doc, 'line', id, { within: other.id })
    if (otherDepth < depth) return doc
  }
  return doc
}

/** Takes a line one level out. */
export function nestOut(doc: GuideDocument, id: Id): GuideDocument {
  const line = doc.lines.find((each) => each.id === id)
  if (line?.within === undefined) return doc
  const outer = doc.lines.find((each) => each.id === line.within)
  return setNode(doc, 'line', id, { within: outer?.within })
}

/** Moves a line by one place in the list, which changes the balloons. */
export function moveLine(doc: GuideDocument, id: Id, by: -1 | 1): GuideDocument {
  const index = doc.lines.findIndex((line) => line.id === id)
  const to = index + by
  return index === -1 || to < 0 || to >= doc.lines.length ? doc : moveNode(doc, 'line', id, null, to)
}
