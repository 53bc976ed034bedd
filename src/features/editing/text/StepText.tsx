import { useEffect, useState } from 'react'
import { useTranslation } from 'react-i18next'
import type { Editor } from '@tiptap/core'
import { Dropcursor, Gapcursor, Placeholder } from '@tiptap/extensions'
import { EditorContent, useEditor } from '@tiptap/react'
import { insertNode, setNode } from '../../../../shared/guide/edit'
import type { Measure, RichText, Step } from '../../../../shared/guide/schema'
import { inlinesOf } from '../../../../shared/guide/plainText'
import { stepsOf } from '../../../../shared/guide/stepsOf'
import type { Id } from '../../../../shared/lib/ids/id'
import { directionOf } from '../../../../shared/lib/language/direction'
import { useDraft } from '../draftStore'
import { newLine } from '../step/newLine'
import { conditionsInText } from './conditionsInText'
import { fromEditor, isBlank, toEditor } from './convert'
import { ItemGrip } from './ItemGrip'
import { lastingIds } from './lastingIds'
import { LinkForm } from './LinkForm'
import { listKeys, OWN_DEED } from './listKeys'
import { pasting } from './pasting'
import type { Pick } from './pickable'
import { picking, PickStore } from './picking'
import { PickList } from './PickList'
import { QuantityForm } from './QuantityForm'
import { quantityRule } from './quantityRule'
import { takeOver } from './takeOver'
import { TextActsContext } from './textActs'
import { TextHost } from './textHost'
import { textMarks } from './textMarks'
import { textNodes } from './textNodes'
import { TextTools } from './TextTools'
import { UseOffer } from './UseOffer'
import './text.css'

/** The rich text of a step. */
export function StepText({ stepId }: { stepId: Id }) {
  const { document } = useDraft()
  const step = stepsOf(document).find(({ id }) => id === stepId)
  return step === undefined ? null : <TextEditor key={stepId} step={step} />
}

/** A small box that is open beside the text. */
type Form =
  | { is: 'number'; anchor: Element; pos: number | null; measure: Measure | null }
  | { is: 'link'; anchor: Element; href: string; needsWords: boolean }

function TextEditor({ step }: { step: Step }) {
  const { t } = useTranslation('editingText')
  const draft = useDraft()
  const { document, newId, readOnly } = draft
  const [host] = useState(() => new TextHost(draft, step.id, (names) => t('onlyWith', { names })))
  const [store] = useState(() => new PickStore())
  const [form, setForm] = useState<Form | null>(null)
  const [offer, setOffer] = useState<{ line: Id; count: string } | null>(null)

  const editor = useEditor({
    immediatelyRender: false,
    extensions: [
      ...textNodes(host),
      ...textMarks,
      lastingIds(newId),
      listKeys,
      quantityRule,
      pasting,
      conditionsInText(host),
      picking(host, store),
      Placeholder.configure({ placeholder: () => t('placeholder'), showOnlyCurrent: false }),
      Dropcursor.configure({ color: 'var(--oxide)', width: 2 }),
      Gapcursor,
    ],
    content: toEditor(step.body, newId),
    editable: !readOnly,
    editorProps: {
      attributes: {
        role: 'textbox',
        'aria-multiline': 'true',
        'aria-label': t('label'),
        'aria-autocomplete': 'list',
        'aria-haspopup': 'listbox',
        lang: document.lang,
        dir: directionOf(document.lang),
      },
      handleKeyDown: (view, event) => {
        if (event.key === 'k' && (event.ctrlKey || event.metaKey) && !event.altKey && !event.shiftKey) {
          event.preventDefault()
          host.acts?.openLink(anchorOf(view))
          return true
        }
        const { selection } = view.state
        const chosen = view.state.doc.nodeAt(selection.from)
        if (event.key !== 'Enter' || selection.empty || chosen?.type.name !== 'quantity') return false
        const place = view.nodeDOM(selection.from)
        if (place instanceof Element) host.acts?.changeQuantity(selection.from, place)
        return true
      },
    },
    onUpdate: ({ editor: now, transaction }) => {
      if (transaction.getMeta('from outside') === true) return
      const body = fromEditor(now.getJSON())
      // An empty place to write in is no text yet.
      if (isBlank(body) && host.body.content.length === 0) return
      host.wrote(body)
      const deed = transaction.getMeta(OWN_DEED) as string | undefined
      host.now.edit(
        (doc) => setNode(doc, 'step', step.id, { body }),
        deed === undefined ? `text:${step.id}` : deed === 'move' ? undefined : deed,
      )
    },
  })

  useEffect(() => editor?.setEditable(!readOnly, false), [editor, readOnly])
  useTakeOver(editor, host, step.body)

  const choose = (pick: Pick, range: { from: number; to: number }): void => {
    if (editor === null) return
    const deed = `pick:${newId()}`
    const put = (type: string, attrs: Record<string, unknown>): void => {
      editor
        .chain()
        .setMeta(OWN_DEED, deed)
        .focus()
        .insertContentAt(range, [
          { type, attrs },
          { type: 'text', text: ' ' },
        ])
        .run()
    }
    if (pick.is === 'step') return put('stepRef', { step: pick.id })
    if (pick.is === 'figure') return put('figureRef', { figure: pick.id })
    const before = editor.state.doc.textBetween(Math.max(0, range.from - 20), range.from, ' ', ' ')
    const count = /(?:^|\s)(\d{1,5})\s*[x×]?\s*$/.exec(before)?.[1] ?? '1'
    if (pick.is === 'line') {
      put('balloon', { line: pick.id })
      if (!usesLine(host, pick.id)) setOffer({ line: pick.id, count })
      return
    }
    const line = newLine(newId, pick.name)
    host.now.edit((doc) => insertNode(doc, 'line', line, null), deed)
    put('balloon', { line: line.id })
    setOffer({ line: line.id, count })
  }

  const pickBy = (char: '@' | '#'): void => {
    if (editor === null) return
    const { $from } = editor.state.selection
    const before = $from.parent.textBetween(
      Math.max(0, $from.parentOffset - 1),
      $from.parentOffset,
      undefined,
      'x',
    )
    editor
      .chain()
      .focus()
      .insertContent(before === '' || /\s/.test(before) ? char : ` ${char}`)
      .run()
  }

  const changeQuantity = (pos: number, anchor: Element): void => {
    const attrs = editor?.state.doc.nodeAt(pos)?.attrs
    if (attrs === undefined || readOnly) return
    const { value, unit, typed } = attrs as Measure & { typed: string | null }
    setForm({ is: 'number', anchor, pos, measure: { value, unit, ...(typed !== null && { typed }) } })
  }

  const putQuantity = (measure: Measure): void => {
    if (editor === null || form?.is !== 'number') return
    setForm(null)
    const chain = editor.chain().focus()
    if (form.pos === null)
      chain
        .insertContent([
          { type: 'quantity', attrs: measure },
          { type: 'text', text: ' ' },
        ])
        .run()
    else {
      const marks = editor.state.doc.nodeAt(form.pos)?.marks.map((mark) => mark.toJSON() as { type: string })
      chain
        .insertContentAt({ from: form.pos, to: form.pos + 1 }, { type: 'quantity', attrs: measure, marks })
        .run()
    }
  }

  const openLink = (anchor: Element): void => {
    if (editor === null) return
    const href = String(editor.getAttributes('link').href ?? '')
    setForm({ is: 'link', anchor, href, needsWords: editor.state.selection.empty && href === '' })
  }

  const putLink = (href: string, words: string): void => {
    if (editor === null || form?.is !== 'link') return
    setForm(null)
    const chain = editor.chain().focus()
    if (form.needsWords) {
      chain.insertContent({ type: 'text', text: words, marks: [{ type: 'link', attrs: { href } }] }).run()
    } else chain.extendMarkRange('link').setMark('link', { href }).run()
  }

  useEffect(() => host.take(draft, { choose, openLink, changeQuantity }))

  if (editor === null) return null
  return (
    <TextActsContext value={{ changeQuantity, when: step.when }}>
      <div className="step-text">
        {!readOnly && (
          <TextTools
            editor={editor}
            onPick={pickBy}
            onNumber={(anchor) => setForm({ is: 'number', anchor, pos: null, measure: null })}
            onLink={openLink}
          />
        )}
        <div className="text-place">
          <EditorContent editor={editor} />
          {!readOnly && <ItemGrip editor={editor} />}
          <PickList store={store} editor={editor} />
        </div>
        {offer !== null && isOpenOffer(step, offer.line) && (
          <UseOffer {...offer} step={step} onDone={() => setOffer(null)} />
        )}
        {form?.is === 'number' && (
          <QuantityForm
            anchor={form.anchor}
            measure={form.measure}
            onDone={putQuantity}
            onClose={() => setForm(null)}
            onRemove={
              form.pos === null
                ? undefined
                : () => {
                    editor
                      .chain()
                      .focus()
                      .deleteRange({ from: form.pos!, to: form.pos! + 1 })
                      .run()
                    setForm(null)
                  }
            }
          />
        )}
        {form?.is === 'link' && (
          <LinkForm
            anchor={form.anchor}
            href={form.href}
            needsWords={form.needsWords}
            onDone={putLink}
            onClose={() => setForm(null)}
            onRemove={
              form.href === ''
                ? undefined
                : () => {
                    editor.chain().focus().extendMarkRange('link').unsetMark('link').run()
                    setForm(null)
                  }
            }
          />
        )}
      </div>
    </TextActsContext>
  )
}

const usesLine = (host: TextHost, line: Id): boolean =>
  stepsOf(host.now.document)
    .find(({ id }) => id === host.stepId)
    ?.uses.some((use) => use.line === line) ?? false

/** The block that the cursor stands in, to put a box beside it. */
function anchorOf(view: Editor['view']): Element {
  const { node } = view.domAtPos(view.state.selection.from)
  return node instanceof Element ? node : node.parentElement!
}

/** The text still names the part, and the step does not take it in hand. */
const isOpenOffer = (step: Step, line: Id): boolean =>
  !step.uses.some((use) => use.line === line) &&
  inlinesOf(step.body).some((inline) => inline.type === 'balloon' && inline.attrs.line === line)

/** What comes from outside (undo, another author) is shown; what was written here is there already. */
function useTakeOver(editor: Editor | null, host: TextHost, body: RichText): void {
  useEffect(() => {
    if (editor === null || host.isOwn(body)) return
    host.wrote(body)
    if (!editor.view.composing) return takeOver(editor, body, host.now.newId)
    // Letters that are being composed (Chinese, Japanese …) would be lost: wait until they are whole.
    const { dom } = editor.view
    const after = (): void => takeOver(editor, body, host.now.newId)
    dom.addEventListener('compositionend', after, { once: true })
    return () => dom.removeEventListener('compositionend', after)
  }, [editor, host, body])
}
