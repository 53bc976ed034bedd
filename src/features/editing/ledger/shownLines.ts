import type { Reconciled } from '../../../../shared/guide/reconcile'
import type { GuideDocument, Line } from '../../../../shared/guide/schema'
import type { Id } from '../../../../shared/lib/ids/id'

export type Order = 'listed' | 'name' | 'kind' | 'balance'

/** A view of the list: it never changes the order that balloons count. */
export interface View {
  words: string
  order: Order
}

/** As listed and whole: then lines can be moved. */
export const isWhole = ({ words, order }: View): boolean => words.trim() === '' && order === 'listed'

/** Whether list and steps say different things of a line. */
export const isOff = (reconciled: Reconciled | undefined): boolean =>
  reconciled !== undefined && !['even', 'as needed'].includes(reconciled.balance)

/** The lines that hold all these words, anywhere in them, in the order asked for. */
export function shownLines(
  { lines }: GuideDocument,
  view: View,
  balances: ReadonlyMap<Id, Reconciled>,
  numbers: Readonly<Record<Id, number>>,
): readonly Line[] {
  const words = view.words.trim().toLocaleLowerCase().split(/\s+/).filter(Boolean)
  const found =
    words.length === 0
      ? lines
      : lines.filter((line) => words.every((word) => holdsWord(line, word, numbers[line.id])))
  const nameOf = (line: Line): string => line.options[0]!.part.name
  switch (view.order) {
    case 'listed':
      return found
    case 'name':
      return found.toSorted((a, b) => nameOf(a).localeCompare(nameOf(b), undefined, { numeric: true }))
    case 'kind':
      return found.toSorted((a, b) => a.kind.localeCompare(b.kind))
    case 'balance':
      return found.toSorted((a, b) => Number(isOff(balances.get(b.id))) - Number(isOff(balances.get(a.id))))
  }
}

function holdsWord(line: Line, word: string, number: number | undefined): boolean {
  if (word === String(number)) return true
  const texts = line.options.flatMap(({ part }) => [part.name, part.specification, part.designation ?? ''])
  return [...texts, line.note].some((text) => text.toLocaleLowerCase().includes(word))
}
