import { Extension, type Editor, wrappingInputRule } from '@tiptap/core'
import { Selection, TextSelection } from '@tiptap/pm/state'

/** Lists deeper than this are not made: nobody reads them, and what walks a document has a limit. */
const DEEPEST_LIST = 5

/** How lists are made and moved by keys. */
export const listKeys = Extension.create({
  name: 'listKeys',
  addKeyboardShortcuts() {
    const { editor } = this
    return {
      Enter: () => editor.commands.splitListItem('listItem'),
      'Shift-Enter': () => editor.commands.insertContent({ type: 'lineBreak' }),
      'Alt-ArrowUp': () => moveItem(editor, -1),
      'Alt-ArrowDown': () => moveItem(editor, 1),
      'Mod-]': () => nestDeeper(editor),
      'Mod-[': () => editor.commands.liftListItem('listItem'),
      Backspace: () => atItemStart(editor) && editor.commands.liftListItem('listItem'),
      'Mod-Shift-7': () => editor.commands.toggleList('orderedList', 'listItem'),
      'Mod-Shift-8': () => editor.commands.toggleList('bulletList', 'listItem'),
    }
  },
  addInputRules() {
    const { orderedList, bulletList, note } = this.editor.schema.nodes
    return [
      wrappingInputRule({ find: /^\s*(?:1|a)[.)]\s$/, type: orderedList! }),
      wrappingInputRule({ find: /^\s*[-*•]\s$/, type: bulletList! }),
      wrappingInputRule({ find: /^\s*>\s$/, type: note! }),
    ]
  },
})

export const nestDeeper = (editor: Editor): boolean =>
  depthOfLists(editor) < DEEPEST_LIST && editor.commands.sinkListItem('listItem')

function depthOfLists({ state }: Editor): number {
  const { $from } = state.selection
  return Array.from({ length: $from.depth }, (_, depth) => $from.node(depth + 1)).filter(
    ({ type }) => type.name === 'listItem',
  ).length
}

function atItemStart({ state }: Editor): boolean {
  const { $from, empty } = state.selection
  if (!empty || $from.parentOffset > 0 || $from.depth < 2) return false
  return $from.node(-1).type.name === 'listItem' && $from.index(-1) === 0
}

/** Marks a change that undo takes back by itself, and not together with the typing before it. Changes with the same value are one. */
export const OWN_DEED = 'own deed'

/** Moves the innermost list item that holds the cursor past its neighbour; the cursor goes along. */
export function moveItem({ state, view }: Editor, by: -1 | 1): boolean {
  const { $from } = state.selection
  let depth = $from.depth
  while (depth > 0 && $from.node(depth).type.name !== 'listItem') depth -= 1
  if (depth === 0) return false
  const list = $from.node(depth - 1)
  const index = $from.index(depth - 1)
  const neighbour = list.maybeChild(index + by)
  // At the end of the list the key is still this one's: the browser must not go to another page.
  if (neighbour === undefined || neighbour === null) return true
  const item = $from.node(depth)
  const start = $from.before(depth)
  const within = state.selection.head - start
  const to = by === -1 ? start - neighbour.nodeSize : start + neighbour.nodeSize
  const tr = state.tr.delete(start, start + item.nodeSize).insert(to, item)
  const cursor = Math.min(to + within, tr.doc.content.size)
  const place = tr.doc.resolve(cursor)
  tr.setSelection(place.parent.isTextblock ? TextSelection.create(tr.doc, cursor) : Selection.near(place))
  view.dispatch(tr.setMeta(OWN_DEED, 'move').scrollIntoView())
  return true
}
