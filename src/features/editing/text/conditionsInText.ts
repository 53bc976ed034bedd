import { Extension } from '@tiptap/core'
import { Plugin } from '@tiptap/pm/state'
import { Decoration, DecorationSet } from '@tiptap/pm/view'
import type { Condition } from '../../../../shared/guide/schema'
import type { TextHost } from './textHost'

/** An instruction that is there only with some part says so over its first line. */
export const conditionsInText = (host: TextHost) =>
  Extension.create({
    name: 'conditionsInText',
    addProseMirrorPlugins: () => [
      new Plugin({
        props: {
          decorations: ({ doc }) => {
            const found: Decoration[] = []
            doc.descendants((node, pos) => {
              const when = node.type.name === 'listItem' ? (node.attrs.when as Condition | null) : null
              if (when !== null && when.length > 0) {
                const sentence = host.onlyWith(when)
                found.push(
                  Decoration.widget(pos + 1, () => sentenceOf(sentence), { side: -1, key: sentence }),
                )
              }
              return !node.isTextblock
            })
            return DecorationSet.create(doc, found)
          },
        },
      }),
    ],
  })

function sentenceOf(sentence: string): HTMLElement {
  const element = document.createElement('span')
  element.className = 'only'
  element.contentEditable = 'false'
  element.textContent = sentence
  return element
}
