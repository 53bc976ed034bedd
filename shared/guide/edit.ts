import type { Id } from '../lib/ids/id'
import type {
  Callout,
  Caution,
  Check,
  Claim,
  Figure,
  GuideDocument,
  Line,
  Model,
  Option,
  Section,
  Source,
  Step,
  Tool,
  Use,
} from './schema'

/** What can be inserted, moved, removed and set. */
export interface NodeOf {
  section: Section
  step: Step
  use: Use
  check: Check
  caution: Caution
  line: Line
  option: Option
  source: Source
  tool: Tool
  figure: Figure
  callout: Callout
  model: Model
  claim: Claim
  skill: GuideDocument['skills'][number]
  credit: GuideDocument['credits'][number]
}
export type NodeKind = keyof NodeOf

/** The list in which a node of each kind stands; a parent of null is the document itself. */
const FIELD: Record<NodeKind, string> = {
  section: 'sections',
  step: 'steps',
  use: 'uses',
  check: 'checks',
  caution: 'cautions',
  line: 'lines',
  option: 'options',
  source: 'sources',
  tool: 'tools',
  figure: 'figures',
  callout: 'callouts',
  model: 'models',
  claim: 'claims',
  skill: 'skills',
  credit: 'credits',
}

type Json = null | boolean | number | string | Json[] | { [key: string]: Json }
type Node = { id: string } & { [key: string]: Json }
type Change = (list: Node[], parent: Id | null) => Node[]

/** Maps every list of this kind; what is unchanged is shared with the old document, so that identity tells what changed. */
function mapLists(doc: GuideDocument, kind: NodeKind, change: Change): GuideDocument {
  const field = FIELD[kind]
  const walk = (value: Json, parent: Id | null): Json => {
    if (Array.isArray(value)) {
      const next = value.map((item) => walk(item, parent))
      return next.every((item, index) => item === value[index]) ? value : next
    }
    if (value === null || typeof value !== 'object') return value
    const self = typeof value.id === 'string' ? value.id : parent
    let next: { [key: string]: Json } | undefined
    for (const [key, old] of Object.entries(value)) {
      let fresh = walk(old, self)
      if (key === field && Array.isArray(fresh) && fresh.every(isNode)) fresh = change(fresh, self)
      if (fresh !== old) next = { ...(next ?? value), [key]: fresh }
    }
    return next ?? value
  }
  // A document is plain JSON by its schema; the walk keeps its shape.
  return walk(doc as unknown as Json, null) as unknown as GuideDocument
}

function isNode(value: Json): value is Node {
  return value !== null && typeof value === 'object' && !Array.isArray(value) && typeof value.id === 'string'
}

/** The node of this kind with this id, or undefined. */
export function findNode<K extends NodeKind>(doc: GuideDocument, kind: K, id: Id): NodeOf[K] | undefined {
  let found: Node | undefined
  mapLists(doc, kind, (list) => {
    found ??= list.find((node) => node.id === id)
    return list
  })
  return found as NodeOf[K] | undefined
}

/** Sets fields of a node; a field set to undefined is taken away. @returns the same document if there is no such node. */
export function setNode<K extends NodeKind>(
  doc: GuideDocument,
  kind: K,
  id: Id,
  patch: Partial<NodeOf[K]>,
): GuideDocument {
  return mapLists(doc, kind, (list) =>
    list.some((node) => node.id === id)
      ? list.map((node) =>
          node.id === id ? withPatch(node, patch as { [key: string]: Json | undefined }) : node,
        )
      : list,
  )
}

function withPatch(node: Node, patch: { [key: string]: Json | undefined }): Node {
  const next = { ...node }
  for (const [key, value] of Object.entries(patch)) {
    if (value === undefined) delete next[key]
    else next[key] = value
  }
  return next
}

/** Puts a node into its parent's list at a place (at the end if none is given). `parent` null is the document. */
export function insertNode<K extends NodeKind>(
  doc: GuideDocument,
  kind: K,
  node: NodeOf[K],
  parent: Id | null,
  index?: number,
): GuideDocument {
  return mapLists(doc, kind, (list, owner) => {
    if (owner !== parent) return list
    const at = index === undefined ? list.length : Math.max(0, Math.min(index, list.length))
    return [...list.slice(0, at), node as unknown as Node, ...list.slice(at)]
  })
}

/** Takes a node out of its list. What refers to it stays: `removeReferences` mends that. */
export function removeNode(doc: GuideDocument, kind: NodeKind, id: Id): GuideDocument {
  return mapLists(doc, kind, (list) =>
    list.some((node) => node.id === id) ? list.filter((node) => node.id !== id) : list,
  )
}

/**
 * Moves a node to a place in a parent's list, counted after it has been taken out.
 * @returns the same document where node or parent is missing, so that a node is never lost by a bad target.
 */
export function moveNode(
  doc: GuideDocument,
  kind: NodeKind,
  id: Id,
  parent: Id | null,
  index: number,
): GuideDocument {
  const node = findNode(doc, kind, id)
  if (node === undefined) return doc
  const without = removeNode(doc, kind, id)
  const moved = insertNode(without, kind, node, parent, index)
  return moved === without ? doc : moved
}
