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

/** The lists in which nodes of each kind stand, as fields from the document down. What is not on the way is never looked at. */
const LISTS: Record<NodeKind, readonly (readonly string[])[]> = {
  section: [['sections']],
  step: [['sections', 'steps']],
  use: [['sections', 'steps', 'uses']],
  check: [['sections', 'steps', 'checks']],
  caution: [['cautions'], ['sections', 'steps', 'cautions']],
  line: [['lines']],
  option: [['lines', 'options']],
  source: [['lines', 'options', 'sources']],
  tool: [['tools']],
  figure: [['figures']],
  callout: [['figures', 'callouts']],
  model: [['models']],
  claim: [['claims']],
  skill: [['skills']],
  credit: [['credits']],
}

type Node = { readonly id: Id } & Readonly<Record<string, unknown>>
type Change = (list: readonly Node[], parent: Id | null) => readonly Node[]

/**
 * Maps every list of this kind; what is unchanged is shared with the old document, so that identity tells what changed. It runs on
 * each key that is pressed, so it goes only down the fields that lead to such lists. Cost O(nodes of this kind and above).
 */
function mapLists(doc: GuideDocument, kind: NodeKind, change: Change): GuideDocument {
  // A document is plain data by its schema; LISTS names only lists of nodes with an id.
  const root = doc as unknown as Omit<Node, 'id'>
  return LISTS[kind].reduce(
    (mapped, path) => mapAt(mapped, null, path, change),
    root,
  ) as unknown as GuideDocument
}

function mapAt<T extends Omit<Node, 'id'>>(
  owner: T,
  ownerId: Id | null,
  [field, ...rest]: readonly string[],
  change: Change,
): T {
  const list = owner[field!] as readonly Node[]
  const next =
    rest.length === 0 ? change(list, ownerId) : list.map((node) => mapAt(node, node.id, rest, change))
  return sameMembers(list, next) ? owner : { ...owner, [field!]: next }
}

const sameMembers = (a: readonly unknown[], b: readonly unknown[]): boolean =>
  a === b || (a.length === b.length && a.every((item, index) => item === b[index]))

/** The node of this kind with this id, or undefined. */
export function findNode<K extends NodeKind>(doc: GuideDocument, kind: K, id: Id): NodeOf[K] | undefined {
  return findWithParent(doc, kind, id)?.node
}

function findWithParent<K extends NodeKind>(
  doc: GuideDocument,
  kind: K,
  id: Id,
): { node: NodeOf[K]; parent: Id | null } | undefined {
  let found: { node: Node; parent: Id | null } | undefined
  mapLists(doc, kind, (list, parent) => {
    const node = found === undefined ? list.find((candidate) => candidate.id === id) : undefined
    if (node !== undefined) found = { node, parent }
    return list
  })
  return found as { node: NodeOf[K]; parent: Id | null } | undefined
}

/**
 * Sets fields of a node; a field set to undefined is taken away.
 * @returns the same document if there is no such node, or if it has these very values already.
 */
export function setNode<K extends NodeKind>(
  doc: GuideDocument,
  kind: K,
  id: Id,
  patch: Partial<NodeOf[K]>,
): GuideDocument {
  return mapLists(doc, kind, (list) =>
    list.some((node) => node.id === id)
      ? list.map((node) => (node.id === id ? withPatch(node, patch as Record<string, unknown>) : node))
      : list,
  )
}

function withPatch(node: Node, patch: Readonly<Record<string, unknown>>): Node {
  if (Object.entries(patch).every(([key, value]) => node[key] === value)) return node
  const set = Object.entries({ ...node, ...patch }).filter(([, value]) => value !== undefined)
  return Object.fromEntries(set) as Node
}

/**
 * Puts a node into its parent's list at a place (at the end if none is given). `parent` null is the document.
 * @returns the same document where there is no such parent.
 */
export function insertNode<K extends NodeKind>(
  doc: GuideDocument,
  kind: K,
  node: NodeOf[K],
  parent: Id | null,
  index?: number,
): GuideDocument {
  return mapLists(doc, kind, (list, owner) =>
    // A union of node types does not narrow by K; the list is of this kind.
    owner === parent ? withAt(list, node as unknown as Node, index ?? list.length) : list,
  )
}

function withAt(list: readonly Node[], node: Node, index: number): Node[] {
  const at = Math.max(0, Math.min(index, list.length))
  return [...list.slice(0, at), node, ...list.slice(at)]
}

/** Takes a node out of its list. What refers to it stays: `removeWithReferences` takes that along. */
export function removeNode(doc: GuideDocument, kind: NodeKind, id: Id): GuideDocument {
  return mapLists(doc, kind, (list) =>
    list.some((node) => node.id === id) ? list.filter((node) => node.id !== id) : list,
  )
}

/**
 * Moves a node to a place in a parent's list, counted after it has been taken out.
 * @returns the same document where node or parent is missing, so that a node is never lost by a bad target, and where it is there already.
 */
export function moveNode(
  doc: GuideDocument,
  kind: NodeKind,
  id: Id,
  parent: Id | null,
  index: number,
): GuideDocument {
  const found = findWithParent(doc, kind, id)
  if (found === undefined) return doc
  if (found.parent === parent) {
    return mapLists(doc, kind, (list, owner) =>
      owner === parent && list.some((node) => node.id === id)
        ? withAt(
            list.filter((node) => node.id !== id),
            found.node as unknown as Node,
            index,
          )
        : list,
    )
  }
  const without = removeNode(doc, kind, id)
  const moved = insertNode(without, kind, found.node, parent, index)
  return moved === without ? doc : moved
}
