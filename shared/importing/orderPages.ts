/** A page with where its links lead, as paths of other pages. */
export interface LinkedPage {
  path: string
  leadsTo: string[]
}

/** Pages in the order in which somebody reads them: the README first, else what no other page leads to, then as the links go. */
export function orderPages<T extends LinkedPage>(pages: readonly T[]): T[] {
  const byPath = new Map(pages.map((page) => [page.path, page]))
  const led = new Set(pages.flatMap((page) => page.leadsTo.filter((path) => path !== page.path)))
  const rank = (page: T): number =>
    (/(^|\/)readme\.[^/]*$/i.test(page.path) ? 0 : led.has(page.path) ? 2000 : 1000) +
    page.path.split('/').length
  const starts = pages.toSorted((a, b) => rank(a) - rank(b) || (a.path < b.path ? -1 : 1))
  const ordered = new Set<T>()
  for (const start of starts) {
    const waiting = [start]
    for (let page = waiting.pop(); page !== undefined; page = waiting.pop()) {
      if (ordered.has(page)) continue
      ordered.add(page)
      const next = page.leadsTo.flatMap((path) => byPath.get(path) ?? [])
      waiting.push(...next.toReversed())
    }
  }
  return [...ordered]
}
