import { Extension } from '@tiptap/core'
import type { Node } from '@tiptap/pm/model'
import { Plugin, type EditorState, type Transaction } from '@tiptap/pm/state'
import { Mapping } from '@tiptap/pm/transform'
import type { Id, NewId } from '../../../../shared/lib/ids/id'
import { BLOCKS } from './textNodes'

interface Block {
  pos: number
  node: Node
}

/** Every block has an id, and no two the same one: what has been split, pasted or copied gets a new one. */
export const lastingIds = (newId: NewId) =>
  Extension.create({
    name: 'lastingIds',
    addProseMirrorPlugins: () => [
      new Plugin({
        appendTransaction: (transactions, before, after) =>
          transactions.some(({ docChanged }) => docChanged)
            ? withIds(transactions, before, after, newId)
            : null,
      }),
    ],
  })

function withIds(
  transactions: readonly Transaction[],
  before: EditorState,
  after: EditorState,
  newId: NewId,
): Transaction | null {
  const blocks: Block[] = []
  after.doc.descendants((node, pos) => {
    if (BLOCKS.has(node.type.name)) blocks.push({ pos, node })
    return !node.isTextblock
  })
  const byId = new Map<Id | null, Block[]>()
  for (const block of blocks) {
    const id = block.node.attrs.id as Id | null
    byId.set(id, [...(byId.get(id) ?? []), block])
  }
  if (byId.size === blocks.length && !byId.has(null)) return null
  const changes = new Mapping(transactions.flatMap((each) => each.mapping.maps))
  const tr = after.tr
  for (const [id, same] of byId) {
    const keeper = id === null ? undefined : keeperOf(same, placeOf(id, before.doc, changes))
    for (const block of same) if (block !== keeper) tr.setNodeAttribute(block.pos, 'id', newId())
  }
  return tr.docChanged ? tr : null
}

/** Where the block that had the id stands now. */
function placeOf(id: Id, before: Node, changes: Mapping): number | undefined {
  let place: number | undefined
  before.descendants((node, pos) => {
    if (place === undefined && node.attrs.id === id && !node.isInline) place = changes.map(pos)
    return place === undefined && !node.isTextblock
  })
  return place
}

/**
 * The one that was there before keeps the id. But a paragraph split at its very start leaves its old place empty: the id goes with the
 * words, since translations hang on it.
 */
function keeperOf(same: readonly Block[], place: number | undefined): Block {
  const old = same.find(({ pos }) => pos === place)
  if (old !== undefined && !isEmpty(old.node)) return old
  return same.find(({ node }) => !isEmpty(node)) ?? old ?? same[0]!
}

function isEmpty(node: Node): boolean {
  let empty = true
  node.descendants((inner) => {
    if (inner.isInline) empty = false
    return empty
  })
  return empty
}
