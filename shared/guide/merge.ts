import type { Id } from '../lib/ids/id'
import { canonicalJson } from '../lib/json/hash'
import type { GuideDocument } from './schema'

/** A place that both sides changed in different ways. The merged document holds the preferred side; both are given here. */
export interface Conflict {
  /** The node that holds the field; null is the document itself. */
  node: Id | null
  field: string
  why: 'both changed' | 'changed and removed' | 'both moved' | 'both reordered'
  base: unknown
  mine: unknown
  theirs: unknown
}

export interface Merged {
  document: GuideDocument
  conflicts: Conflict[]
}

type Json = null | boolean | number | string | Json[] | JsonObject
interface JsonObject {
  [key: string]: Json
}
type Side = 'mine' | 'theirs'

/** Objects without an id whose fields are still merged one by one; every other one (a quantity, a place) is a single value. */
const MERGED_BY_FIELD = new Set(['part', 'print', 'body'])

/** Where each identified node stands: `parent id/field`, and the node itself. */
type Index = Map<Id, { list: string; node: JsonObject }>

/**
 * Three-way merge by lasting ids. Different nodes, and different fields of one node, combine; a move and an edit of one node combine;
 * two inserts at one place are both kept. A node that one side changed and the other removed is kept. Where both changed the same
 * field, `prefer` says which stays in the document, and the conflict holds base, mine and theirs, so nothing is lost.
 * Laws: merge(a, a, b) = b, merge(a, b, a) = b, merge(a, b, b) = b. Cost O(nodes) but for reordered lists.
 */
export function merge(
  base: GuideDocument,
  mine: GuideDocument,
  theirs: GuideDocument,
  prefer: Side = 'theirs',
): Merged {
  if (mine === base) return { document: theirs, conflicts: [] }
  if (theirs === base) return { document: mine, conflicts: [] }
  const job = new Merge(asJson(base), asJson(mine), asJson(theirs), prefer)
  return { document: job.run() as unknown as GuideDocument, conflicts: job.conflicts }
}

// A document is plain JSON by its schema; merging works on that.
const asJson = (doc: GuideDocument): JsonObject => doc as unknown as JsonObject

class Merge {
  readonly conflicts: Conflict[] = []
  private readonly inBase: Index
  private readonly inMine: Index
  private readonly inTheirs: Index

  constructor(
    private readonly base: JsonObject,
    private readonly mine: JsonObject,
    private readonly theirs: JsonObject,
    private readonly prefer: Side,
  ) {
    this.inBase = indexOf(base)
    this.inMine = indexOf(mine)
    this.inTheirs = indexOf(theirs)
  }

  run(): JsonObject {
    return this.fields(null, this.base, this.mine, this.theirs)
  }

  private fields(node: Id | null, base: JsonObject, mine: JsonObject, theirs: JsonObject): JsonObject {
    if (mine === base) return theirs
    if (theirs === base) return mine
    const keys = new Set([...Object.keys(theirs), ...Object.keys(mine), ...Object.keys(base)])
    const merged: JsonObject = {}
    for (const key of keys) {
      const value = this.value(node, key, base[key], mine[key], theirs[key])
      if (value !== undefined) merged[key] = value
    }
    return merged
  }

  private value(
    node: Id | null,
    field: string,
    base: Json | undefined,
    mine: Json | undefined,
    theirs: Json | undefined,
  ): Json | undefined {
    const lists = [base, mine, theirs]
    if (
      lists.every((list) => list === undefined || isWordList(list)) &&
      lists.some((list) => isWordList(list) && list.length > 0)
    ) {
      return this.words(node, field, wordsOf(base), wordsOf(mine), wordsOf(theirs))
    }
    if (
      lists.every((list) => list === undefined || isKeyedList(list)) &&
      lists.some((list) => isKeyedList(list) && list.length > 0)
    ) {
      return this.list(node, field, nodesOf(base), nodesOf(mine), nodesOf(theirs))
    }
    if (same(mine, base)) return theirs
    if (same(theirs, base) || same(mine, theirs)) return mine
    if (MERGED_BY_FIELD.has(field) && isObject(base) && isObject(mine) && isObject(theirs)) {
      return this.fields(node, base, mine, theirs)
    }
    this.conflicts.push({ node, field, why: 'both changed', base, mine, theirs })
    return this.prefer === 'mine' ? mine : theirs
  }

  private list(
    node: Id | null,
    field: string,
    base: JsonObject[],
    mine: JsonObject[],
    theirs: JsonObject[],
  ): Json {
    const here = `${node ?? ''}/${field}`
    const order = this.order(node, field, base.map(idOf), mine.map(idOf), theirs.map(idOf))
    return order.flatMap((id) => {
      if (this.homeOf(id) !== here) return []
      const kept = this.node(id)
      return kept === undefined ? [] : [kept]
    })
  }

  /** A list of ids or codes, such as a step's tools: what either side added is in, what either side took out is out. */
  private words(node: Id | null, field: string, base: string[], mine: string[], theirs: string[]): string[] {
    return this.order(node, field, base, mine, theirs).filter(
      (word) => (mine.includes(word) && theirs.includes(word)) || !base.includes(word),
    )
  }

  /** The list in which a node stands after the merge: where the side that moved it has put it. */
  private homeOf(id: Id): string | undefined {
    const [base, mine, theirs] = [
      this.inBase.get(id)?.list,
      this.inMine.get(id)?.list,
      this.inTheirs.get(id)?.list,
    ]
    if (mine === undefined) return theirs
    if (theirs === undefined) return mine
    if (mine === base) return theirs
    if (theirs === base || theirs === mine) return mine
    return this.prefer === 'mine' ? mine : theirs
  }

  private node(id: Id): JsonObject | undefined {
    const base = this.inBase.get(id)
    const mine = this.inMine.get(id)
    const theirs = this.inTheirs.get(id)
    if (base === undefined) {
      if (mine !== undefined && theirs !== undefined) return this.fields(id, {}, mine.node, theirs.node)
      return mine?.node ?? theirs?.node
    }
    if (mine === undefined && theirs === undefined) return undefined
    if (mine === undefined || theirs === undefined) {
      const kept = (mine ?? theirs)!.node
      if (same(kept, base.node)) return undefined
      this.conflicts.push({
        node: id,
        field: '',
        why: 'changed and removed',
        base: base.node,
        mine: mine?.node,
        theirs: theirs?.node,
      })
      return kept
    }
    if (mine.list !== base.list && theirs.list !== base.list && mine.list !== theirs.list) {
      this.conflicts.push({
        node: id,
        field: '',
        why: 'both moved',
        base: base.list,
        mine: mine.list,
        theirs: theirs.list,
      })
    }
    return this.fields(id, base.node, mine.node, theirs.node)
  }

  /** Ids of both sides in one order: the order of the side that changed it, the other side's own nodes after their neighbour. */
  private order(node: Id | null, field: string, base: Id[], mine: Id[], theirs: Id[]): Id[] {
    const common = (list: Id[]): Id[] =>
      list.filter((id) => base.includes(id) && mine.includes(id) && theirs.includes(id))
    const [b, m, t] = [common(base).join(), common(mine).join(), common(theirs).join()]
    const mineMoved = m !== b
    const theirsMoved = t !== b
    if (mineMoved && theirsMoved && m !== t) {
      this.conflicts.push({ node, field, why: 'both reordered', base, mine, theirs })
    }
    const lead = mineMoved && (!theirsMoved || this.prefer === 'mine') ? mine : theirs
    const other = lead === mine ? theirs : mine
    const result = [...lead]
    other.forEach((id, index) => {
      if (result.includes(id)) return
      const before = other.slice(0, index).findLast((candidate) => result.includes(candidate))
      result.splice(before === undefined ? 0 : result.indexOf(before) + 1, 0, id)
    })
    return result
  }
}

function indexOf(root: JsonObject): Index {
  const index: Index = new Map()
  const walk = (value: Json, owner: Id | null): void => {
    if (!isObject(value)) return
    for (const [field, child] of Object.entries(value)) {
      if (isKeyedList(child)) {
        for (const node of child) {
          const id = idOf(node)
          index.set(id, { list: `${owner ?? ''}/${field}`, node })
          walk(node, id)
        }
      } else if (isObject(child)) walk(child, owner)
    }
  }
  walk(root, null)
  return index
}

const isObject = (value: Json | undefined): value is JsonObject =>
  value !== null && typeof value === 'object' && !Array.isArray(value)

function idOf(node: JsonObject): Id {
  if (typeof node.id === 'string') return node.id
  if (isObject(node.attrs) && typeof node.attrs.id === 'string') return node.attrs.id
  return typeof node.sha256 === 'string' ? node.sha256 : ''
}

/**
 * A list whose members all have an id: their own, in `attrs` as ProseMirror's blocks do, or a file's hash. An empty list is one too.
 */
function isKeyedList(value: Json | undefined): value is JsonObject[] {
  return Array.isArray(value) && value.every((item) => isObject(item) && idOf(item) !== '')
}

function isWordList(value: Json | undefined): value is string[] {
  return Array.isArray(value) && value.every((item) => typeof item === 'string')
}

const wordsOf = (value: Json | undefined): string[] => (isWordList(value) ? value : [])

const nodesOf = (value: Json | undefined): JsonObject[] => (isKeyedList(value) ? value : [])

function same(a: Json | undefined, b: Json | undefined): boolean {
  if (a === b) return true
  if (a === undefined || b === undefined || a === null || b === null) return false
  if (typeof a !== 'object' || typeof b !== 'object') return false
  return canonicalJson(a) === canonicalJson(b)
}
