import { Mark, markInputRule } from '@tiptap/core'
import { LinkAddress } from '../../../../shared/guide/schema'

const Strong = Mark.create({
  name: 'strong',
  parseHTML: () => [
    { tag: 'strong' },
    // Some programs wrap all that they copy in <b style="font-weight: normal">.
    { tag: 'b', getAttrs: (element: HTMLElement) => (element.style.fontWeight === 'normal' ? false : null) },
    { style: 'font-weight', getAttrs: (value) => (/^(bold(er)?|[6-9]\d\d)$/.test(value) ? null : false) },
  ],
  renderHTML: () => ['strong', 0],
  addKeyboardShortcuts() {
    return { 'Mod-b': () => this.editor.commands.toggleMark(this.name) }
  },
  addInputRules() {
    return [markInputRule({ find: /(?:^|\s)(\*\*([^\s*][^*]*)\*\*)$/, type: this.type })]
  },
})

const Emphasis = Mark.create({
  name: 'emphasis',
  parseHTML: () => [{ tag: 'em' }, { tag: 'i' }, { style: 'font-style=italic' }],
  renderHTML: () => ['em', 0],
  addKeyboardShortcuts() {
    return { 'Mod-i': () => this.editor.commands.toggleMark(this.name) }
  },
  addInputRules() {
    return [markInputRule({ find: /(?:^|\s)(\*([^\s*][^*]*)\*)$/, type: this.type })]
  },
})

const Code = Mark.create({
  name: 'code',
  parseHTML: () => [{ tag: 'code' }, { tag: 'kbd' }, { tag: 'samp' }],
  renderHTML: () => ['code', { class: 'mono' }, 0],
  addKeyboardShortcuts() {
    return { 'Mod-e': () => this.editor.commands.toggleMark(this.name) }
  },
  addInputRules() {
    return [markInputRule({ find: /(?:^|\s)(`([^\s`][^`]*)`)$/, type: this.type })]
  },
})

/** Scripts, data and relative addresses are not taken: their words stay, the link goes. */
const Link = Mark.create({
  name: 'link',
  inclusive: false,
  addAttributes: () => ({ href: { default: '' } }),
  parseHTML: () => [
    {
      tag: 'a[href]',
      getAttrs: (element: HTMLElement) =>
        LinkAddress.safeParse(element.getAttribute('href')).success ? null : false,
    },
  ],
  renderHTML: ({ HTMLAttributes }) => ['a', { ...HTMLAttributes, rel: 'nofollow ugc noreferrer' }, 0],
})

/** The marks of shared/guide/schema/text.ts, in the order in which they are stored. */
export const textMarks = [Strong, Emphasis, Code, Link]
