import { useEffect, useId, useSyncExternalStore } from 'react'
import { useTranslation } from 'react-i18next'
import type { Editor } from '@tiptap/core'
import { useDraft } from '../draftStore'
import { PartBalloon } from '../fields/PartBalloon'
import type { Pick } from './pickable'
import type { OpenPick, PickStore } from './picking'

/** The list under the cursor. The focus stays in the text; the editor names the option that Enter takes. */
export function PickList({ store, editor }: { store: PickStore; editor: Editor }) {
  const { t } = useTranslation('editingText')
  const id = useId()
  const open = useSyncExternalStore(store.watch, store.look)
  const at = open?.at ?? null
  useEffect(() => {
    const text = editor.view.dom
    if (at === null) return
    text.setAttribute('aria-controls', id)
    text.setAttribute('aria-activedescendant', `${id}-${at}`)
    document.getElementById(`${id}-${at}`)?.scrollIntoView({ block: 'nearest' })
    return () => {
      text.removeAttribute('aria-controls')
      text.removeAttribute('aria-activedescendant')
    }
  }, [editor, id, at])
  if (open === null) return null
  return (
    <ul
      className="pick-list"
      role="listbox"
      id={id}
      aria-label={t('pick.name')}
      style={placeOf(open, editor)}
    >
      {open.picks.map((pick, index) => (
        <li
          key={pick.is === 'new line' ? 'new' : pick.id}
          id={`${id}-${index}`}
          role="option"
          aria-selected={index === at}
          // The press must not take the focus from the text.
          onMouseDown={(event) => event.preventDefault()}
          onClick={() => open.choose(pick)}
        >
          <PickRow pick={pick} chosen={index === at} />
        </li>
      ))}
    </ul>
  )
}

function PickRow({ pick, chosen }: { pick: Pick; chosen: boolean }) {
  const { t } = useTranslation('editingText')
  const { numbers } = useDraft()
  const hint = (rest: string): string => (chosen ? t('pick.enter') : rest)
  switch (pick.is) {
    case 'line':
      return (
        <>
          <PartBalloon line={pick.id} />
          <span dir="auto">{pick.name}</span>
          <small>{hint(t('pick.line', { number: numbers.line[pick.id] }))}</small>
        </>
      )
    case 'new line':
      return (
        <>
          <span />
          <span>{t('pick.newLine', { name: pick.name })}</span>
          <small>{hint(t('pick.partsList'))}</small>
        </>
      )
    case 'step':
      return (
        <>
          <b>{numbers.step[pick.id]}</b>
          <span dir="auto">{pick.name === '' ? t('pick.untitled') : pick.name}</span>
          <small>{hint(t('pick.step'))}</small>
        </>
      )
    case 'figure':
      return (
        <>
          <b>{numbers.figure[pick.id]}</b>
          <span dir="auto">{pick.name === '' ? t('pick.untitled') : pick.name}</span>
          <small>{hint(t('pick.figure'))}</small>
        </>
      )
  }
}

const WIDTH = 315

/** Under the cursor, within the width of the text. */
function placeOf({ rect }: OpenPick, editor: Editor): { top: number; left: number } {
  const box = editor.view.dom.parentElement?.getBoundingClientRect()
  if (rect === null || box === undefined) return { top: 0, left: 0 }
  const left = Math.max(0, Math.min(rect.left - box.left - 40, box.width - WIDTH))
  return { top: rect.bottom - box.top + 6, left }
}
