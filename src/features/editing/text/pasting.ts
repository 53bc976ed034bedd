import { Extension } from '@tiptap/core'
import { Fragment, Slice, type Node } from '@tiptap/pm/model'
import { Plugin } from '@tiptap/pm/state'
import { wordsToBlocks } from './wordsToBlocks'

/** A text nested deeper than this was not written for a step. */
const DEEPEST = 14

/** How text from elsewhere comes in: HTML by the schema's rules, plain words by `wordsToBlocks`, files not at all (the figures take them). */
export const pasting = Extension.create({
  name: 'pasting',
  addProseMirrorPlugins() {
    const { schema } = this.editor
    return [
      new Plugin({
        props: {
          clipboardTextParser: (text) => {
            const blocks = wordsToBlocks(text).map((json) => schema.nodeFromJSON(json))
            const only = blocks.length === 1 && blocks[0]!.isTextblock
            return new Slice(Fragment.from(blocks), only ? 1 : 0, only ? 1 : 0)
          },
          transformPasted: (slice) => (depthOf(slice.content) > DEEPEST ? flat(slice) : slice),
          handleDOMEvents: {
            paste: (_, event) => isOfFiles(event.clipboardData),
            drop: (_, event) => isOfFiles(event.dataTransfer),
          },
        },
      }),
    ]
  },
})

const isOfFiles = (data: DataTransfer | null): boolean =>
  data !== null &&
  data.files.length > 0 &&
  !data.types.includes('text/html') &&
  !data.types.includes('text/plain')

function depthOf(content: Fragment): number {
  let deepest = 0
  content.forEach((node) => {
    if (!node.isTextblock) deepest = Math.max(deepest, 1 + depthOf(node.content))
  })
  return deepest
}

/** The paragraphs alone: every word, without the nesting. */
function flat(slice: Slice): Slice {
  const paragraphs: Node[] = []
  slice.content.descendants((node) => {
    if (node.isTextblock) paragraphs.push(node)
    return !node.isTextblock
  })
  return new Slice(Fragment.from(paragraphs), 0, 0)
}
