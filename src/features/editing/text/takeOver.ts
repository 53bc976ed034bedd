import type { Editor } from '@tiptap/core'
import type { RichText } from '../../../../shared/guide/schema'
import type { NewId } from '../../../../shared/lib/ids/id'
import { toEditor } from './convert'

/** Shows another text in the editor. Only what differs is replaced, so that the cursor stays where it was when that still is there. */
export function takeOver(editor: Editor, body: RichText, newId: NewId): void {
  const { state, view } = editor
  const next = state.schema.nodeFromJSON(toEditor(body, newId))
  const start = state.doc.content.findDiffStart(next.content)
  if (start === null) return
  const ends = state.doc.content.findDiffEnd(next.content)
  if (ends === null) return
  // "aab" to "ab": both ends may have been counted past the start.
  const overlap = Math.max(0, start - Math.min(ends.a, ends.b))
  const tr = state.tr.replace(start, ends.a + overlap, next.slice(start, ends.b + overlap))
  view.dispatch(tr.setMeta('from outside', true).setMeta('addToHistory', false))
}
