import { stepsOf } from '../../../../shared/guide/stepsOf'
import type { Id } from '../../../../shared/lib/ids/id'
import type { DraftAtHand } from '../draftStore'

/** What can be chosen after "@" (parts) or "#" (steps and figures). */
export type Pick =
  | { is: 'line'; id: Id; name: string }
  | { is: 'new line'; name: string }
  | { is: 'step'; id: Id; name: string }
  | { is: 'figure'; id: Id; name: string }

const MOST = 8

/** Lines whose number or name is meant by these letters, then a new one of that name. Nothing for what is rather a sentence. */
export function pickableParts({ document, numbers }: DraftAtHand, query: string): Pick[] {
  const words = query.trim().toLocaleLowerCase()
  if (/\s$/.test(query) && words === '') return []
  const lines = document.lines.map((line) => ({ id: line.id, name: line.options[0]!.part.name }))
  const byNumber = lines.filter(({ id }) => words !== '' && String(numbers.line[id]) === words)
  const begins = lines.filter(({ name }) => name.toLocaleLowerCase().startsWith(words))
  const holds = lines.filter(({ name }) => name.toLocaleLowerCase().includes(words))
  const found = [...new Map([...byNumber, ...begins, ...holds].map((line) => [line.id, line])).values()]
  const known = found.some(({ name }) => name.toLocaleLowerCase() === words)
  const canBeNew =
    words !== '' && !known && !/^\d+$/.test(words) && words.split(/\s+/).length <= 4 && !/\s$/.test(query)
  return [
    ...found.slice(0, MOST).map(({ id, name }): Pick => ({ is: 'line', id, name })),
    ...(canBeNew ? [{ is: 'new line', name: query.trim() } as const] : []),
  ]
}

/** Steps and figures whose number begins with these letters or whose title or caption holds them. */
export function pickableReferences({ document, numbers }: DraftAtHand, query: string, stepId: Id): Pick[] {
  const words = query.trim().toLocaleLowerCase()
  const fits = (number: string | number | undefined, name: string): boolean =>
    words === '' || String(number ?? '').startsWith(words) || name.toLocaleLowerCase().includes(words)
  const steps = stepsOf(document)
  const own = steps.find(({ id }) => id === stepId)?.figures ?? []
  const order = (id: Id): number => (own.includes(id) ? 0 : 1)
  const figures = document.figures
    .filter(({ id, caption }) => numbers.figure[id] !== undefined && fits(numbers.figure[id], caption))
    .sort((a, b) => order(a.id) - order(b.id))
    .map(({ id, caption }): Pick => ({ is: 'figure', id, name: caption }))
  const others = steps
    .filter(({ id, title }) => id !== stepId && fits(numbers.step[id], title))
    .map(({ id, title }): Pick => ({ is: 'step', id, name: title }))
  return [...figures.slice(0, MOST / 2), ...others.slice(0, MOST)].slice(0, MOST)
}
