import { useTranslation } from 'react-i18next'
import { insertNode, moveNode } from '../../../../shared/guide/edit'
import { takeFromSteps } from '../../../../shared/guide/reconcile'
import { removeWithReferences } from '../../../../shared/guide/removeWithReferences'
import type { Id } from '../../../../shared/lib/ids/id'
import { useDraft } from '../draftStore'
import { useOpenDraft } from '../frame/sessionContext'
import { newLine } from '../step/newLine'
import { choicesFor } from './balances'
import { moveLine, nestDeeper, nestOut } from './lineOrder'

export interface LineActs {
  /** The list is shown whole and as listed, so that lines can be moved. */
  canMove: boolean
  move: (id: Id, by: -1 | 1) => void
  moveTo: (id: Id, to: number) => void
  addBelow: (id: Id) => void
  nest: (id: Id, deeper: boolean) => void
  remove: (id: Id) => void
  take: (id: Id) => void
  openSheet: (id: Id) => void
  focusName: (id: Id) => void
}

/** What can be done to a line as a whole. */
export function useLineActs(canMove: boolean, openSheet: (id: Id) => void): LineActs {
  const { t } = useTranslation('editingLedger')
  const { document, edit, newId, numbers, announce, choices } = useDraft()
  const { sayDone } = useOpenDraft()
  const nameOf = (id: Id): string =>
    document.lines.find((line) => line.id === id)?.options[0]!.part.name ?? ''
  const focusName = (id: Id): void =>
    window.document
      .querySelector<HTMLElement>(`[data-node="${CSS.escape(id)}"] [data-column="name"]`)
      ?.focus({ preventScroll: false })
  return {
    canMove,
    openSheet,
    focusName,
    move: (id, by) => {
      if (!canMove) return announce(t('move.notNow'))
      const moved = moveLine(document, id, by)
      if (moved === document) return announce(t('move.end'))
      edit((doc) => moveLine(doc, id, by))
      announce(t('move.done', { number: (numbers.line[id] ?? 0) + by }))
    },
    moveTo: (id, to) => {
      edit((doc) => moveNode(doc, 'line', id, null, to))
      announce(t('move.done', { number: to + 1 }))
    },
    addBelow: (id) => {
      const within = document.lines.find((line) => line.id === id)?.within
      const line = { ...newLine(newId, ''), ...(within !== undefined && { within }) }
      edit((doc) => insertNode(doc, 'line', line, null, doc.lines.findIndex((each) => each.id === id) + 1))
      setTimeout(() => focusName(line.id))
    },
    nest: (id, deeper) => {
      const change = deeper ? nestDeeper : nestOut
      if (change(document, id) === document) return announce(t(deeper ? 'nest.notIn' : 'nest.notOut'))
      edit((doc) => change(doc, id))
      announce(t(deeper ? 'nest.in' : 'nest.out'))
    },
    remove: (id) => {
      const at = document.lines.findIndex((line) => line.id === id)
      const next = document.lines[at + 1] ?? document.lines[at - 1]
      const uses = document.sections.flatMap(({ steps }) =>
        steps.filter((step) => step.uses.some(({ line }) => line === id)),
      ).length
      edit((doc) => removeWithReferences(doc, 'line', id))
      sayDone(t('removed', { name: nameOf(id), count: uses }))
      if (next !== undefined) setTimeout(() => focusName(next.id))
    },
    take: (id) => {
      edit((doc) => takeFromSteps(doc, id, choicesFor(doc, id, choices)))
      sayDone(t('take.done', { name: nameOf(id) }))
    },
  }
}
