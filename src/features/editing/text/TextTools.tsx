import type { MouseEvent, ReactNode } from 'react'
import { Toolbar } from 'react-aria-components'
import { useTranslation } from 'react-i18next'
import type { Editor } from '@tiptap/core'
import { useEditorState } from '@tiptap/react'
import {
  ArrowDown,
  ArrowUp,
  Bold,
  Italic,
  Link2,
  ListOrdered,
  List as Points,
  StickyNote,
} from 'lucide-react'
import { moveItem } from './listKeys'

export interface TextToolsProps {
  editor: Editor
  onPick: (char: '@' | '#') => void
  onNumber: (anchor: Element) => void
  onLink: (anchor: Element) => void
}

/** What can be done to the text. One stop of the Tab key; arrows go along it. */
export function TextTools({ editor, onPick, onNumber, onLink }: TextToolsProps) {
  const { t } = useTranslation('editingText')
  const on = useEditorState({
    editor,
    selector: ({ editor: now }) => ({
      strong: now.isActive('strong'),
      emphasis: now.isActive('emphasis'),
      link: now.isActive('link'),
      ordered: now.isActive('orderedList'),
      bullets: now.isActive('bulletList'),
      note: now.isActive('note'),
      item: now.isActive('listItem'),
    }),
  })
  const run = () => editor.chain().focus()
  return (
    <Toolbar className="text-tools" aria-label={t('tools.name')}>
      <Tool label={t('tools.part')} hint={t('tools.partHint')} onPress={() => onPick('@')}>
        {t('tools.part')}
      </Tool>
      <Tool label={t('tools.number')} hint={t('tools.numberHint')} onPress={onNumber}>
        {t('tools.number')}
      </Tool>
      <Tool label={t('tools.reference')} hint={t('tools.referenceHint')} onPress={() => onPick('#')}>
        {t('tools.reference')}
      </Tool>
      <Tool
        label={t('tools.instructions')}
        keys="Ctrl+Shift+7"
        pressed={on.ordered}
        onPress={() => run().toggleList('orderedList', 'listItem').run()}
      >
        <ListOrdered size={18} aria-hidden />
      </Tool>
      <Tool
        label={t('tools.points')}
        keys="Ctrl+Shift+8"
        pressed={on.bullets}
        onPress={() => run().toggleList('bulletList', 'listItem').run()}
      >
        <Points size={18} aria-hidden />
      </Tool>
      <Tool label={t('tools.note')} pressed={on.note} onPress={() => run().toggleWrap('note').run()}>
        <StickyNote size={18} aria-hidden />
      </Tool>
      <Tool
        label={t('tools.strong')}
        keys="Ctrl+B"
        pressed={on.strong}
        onPress={() => run().toggleMark('strong').run()}
      >
        <Bold size={18} aria-hidden />
      </Tool>
      <Tool
        label={t('tools.emphasis')}
        keys="Ctrl+I"
        pressed={on.emphasis}
        onPress={() => run().toggleMark('emphasis').run()}
      >
        <Italic size={18} aria-hidden />
      </Tool>
      <Tool label={t('tools.link')} keys="Ctrl+K" pressed={on.link} onPress={onLink}>
        <Link2 size={18} aria-hidden />
      </Tool>
      {on.item && (
        <>
          <Tool label={t('tools.up')} keys="Alt+↑" onPress={() => moveItem(editor, -1)}>
            <ArrowUp size={18} aria-hidden />
          </Tool>
          <Tool label={t('tools.down')} keys="Alt+↓" onPress={() => moveItem(editor, 1)}>
            <ArrowDown size={18} aria-hidden />
          </Tool>
        </>
      )}
    </Toolbar>
  )
}

interface ToolProps {
  label: string
  hint?: string
  keys?: string
  pressed?: boolean
  onPress: (anchor: Element) => void
  children: ReactNode
}

function Tool({ label, hint, keys, pressed, onPress, children }: ToolProps) {
  return (
    <button
      type="button"
      aria-label={label}
      aria-pressed={pressed}
      title={hint ?? (keys === undefined ? label : `${label} (${keys})`)}
      // The cursor stays in the text, and a phone's keyboard stays open.
      onMouseDown={(event: MouseEvent) => event.preventDefault()}
      onClick={(event) => onPress(event.currentTarget)}
    >
      {children}
    </button>
  )
}
