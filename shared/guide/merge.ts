import type { Id } from '../lib/ids/id'
import type { GuideDocument } from './schema'

/** A place that both sides changed in different ways. The merged document holds the preferred side; both are given here. */
export interface Conflict {
  /** The node that holds the field; null is the document itself. */
  node: Id | null
  /** The object of the node that holds the field, where the node does not hold it itself: part, print or body. */
  within?: string
  /** Empty where the whole node is meant. */
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
type Holder = Pick<Conflict, 'node' | 'within'>

/** Objects without an id whose fields are still merged one by one; every other one (a quantity, a place) is a single value. */
const MERGED_BY_FIELD = new Set(['part', 'print', 'body'])

/** Where an identified node stands: the node that holds it (null: the document), the field, and both as one text to compare. */
interface Standing {
  owner: Id | null
  field: string
  list: string
  node: JsonObject
}
type Index = ReadonlyMap<Id, Standing>

/**
 * Three-way merge by lasting ids. Different nodes, and different fields of one node, combine; a move and an edit of one node combine;
 * two inserts at one place are both kept. A node that one side changed or moved and the other removed is kept, with all that is in it.
 * Where both changed the same field, `prefer` says which stays in the document, and the conflict holds base, mine and theirs, so
 * nothing is lost. No id stands twice in what comes out.
 * Laws: merge(a, a, b) = b, merge(a, b, a) = b, merge(a, b, b) = b; the sides exchanged, and the preference with them, give the same.
 * A reference may be left that points at what the other side removed: readiness names it. Cost O(nodes).
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
  /** The list in which each node stands after the merge. */
  private readonly homes: ReadonlyMap<Id, Standing>
  private readonly keptAnswers = new Map<Id, boolean>()

  constructor(
    private readonly base: JsonObject,
    private readonly mine: JsonObject,
    private readonly theirs: JsonObject,
    private readonly prefer: Side,
  ) {
    this.inBase = indexOf(base)
    this.inMine = indexOf(mine)
    this.inTheirs = indexOf(theirs)
    this.homes = this.findHomes()
  }

  run(): JsonObject {
    return this.fields({ node: null }, this.base, this.mine, this.theirs)
  }

  /** Merges field by field. A side is undefined where it does not have the node at all. */
  private fields(
    at: Holder,
    base: JsonObject | undefined,
    mine: JsonObject | undefined,
    theirs: JsonObject | undefined,
  ): JsonObject {
    const keys = new Set([theirs, mine, base].flatMap((side) => Object.keys(side ?? {})))
    const merged: JsonObject = {}
    for (const key of keys) {
      const value = this.value(at, key, base?.[key], mine?.[key], theirs?.[key])
      if (value !== undefined) merged[key] = value
    }
    return merged
  }

  private value(
    at: Holder,
    field: string,
    base: Json | undefined,
    mine: Json | undefined,
    theirs: Json | undefined,
  ): Json | undefined {
    const lists = [base, mine, theirs]
    const some = lists.some((list) => Array.isArray(list) && list.length > 0)
    // Before anything is taken as unchanged: what stands in a list may have been moved there, and changed where it was.
    if (some && lists.every((list) => list === undefined || isKeyedList(list))) {
      return this.list(at, field, nodesOf(base), nodesOf(mine), nodesOf(theirs))
    }
    if (MERGED_BY_FIELD.has(field) && isInAll(base, mine, theirs)) {
      return this.fields({ node: at.node, within: field }, base, objectOf(mine), objectOf(theirs))
    }
    if (same(mine, base)) return theirs
    if (same(theirs, base) || same(mine, theirs)) return mine
    if (some && lists.every((list) => list === undefined || isWordList(list))) {
      return this.words(at, field, wordsOf(base), wordsOf(mine), wordsOf(theirs))
    }
    this.conflict({ ...at, field }, 'both changed', base, mine, theirs)
    return this.prefer === 'mine' ? mine : theirs
  }

  private list(
    at: Holder,
    field: string,
    base: JsonObject[],
    mine: JsonObject[],
    theirs: JsonObject[],
  ): Json {
    const here = `${at.node ?? ''}/${field}`
    const order = this.order(at, field, base.map(idOf), mine.map(idOf), theirs.map(idOf))
    const merged = order.flatMap((id) => {
      if (this.homes.get(id)?.list !== here || !this.isKept(id)) return []
      const made = this.node(id)
      return made === undefined ? [] : [made]
    })
    // Each side took out what the other one left: a line without an option would be no line.
    if (field === 'options' && merged.length === 0) {
      this.conflict({ ...at, field }, 'both changed', base, mine, theirs)
      return this.prefer === 'mine' ? mine : theirs
    }
    return merged
  }

  /** A list of ids or codes, such as a step's tools: what either side added is in, what either side took out is out. */
  private words(at: Holder, field: string, base: string[], mine: string[], theirs: string[]): string[] {
    const [b, m, t] = [new Set(base), new Set(mine), new Set(theirs)]
    return this.order(at, field, base, mine, theirs).filter(
      (word) => (m.has(word) && t.has(word)) || !b.has(word),
    )
  }

  /** Where each node stands after the merge: where the side that moved it has put it. */
  private findHomes(): Map<Id, Standing> {
    const homes = new Map<Id, Standing>()
    for (const id of new Set([...this.inMine.keys(), ...this.inTheirs.keys()])) {
      homes.set(id, this.homeOf(id)!)
    }
    // Two sides may each have put one block into the other: together that is a circle, hung on nothing. The preferred side's tree has none.
    const preferred = this.prefer === 'mine' ? this.inMine : this.inTheirs
    for (const id of homes.keys()) {
      for (let circle = circleFrom(id, homes); circle.length > 0; circle = circleFrom(id, homes)) {
        for (const member of circle) homes.set(member, preferred.get(member) ?? homes.get(member)!)
      }
    }
    return homes
  }

  private homeOf(id: Id): Standing | undefined {
    const [base, mine, theirs] = [this.inBase.get(id), this.inMine.get(id), this.inTheirs.get(id)]
    if (mine === undefined) return theirs
    if (theirs === undefined) return mine
    if (mine.list === base?.list) return theirs
    if (theirs.list === base?.list || theirs.list === mine.list) return mine
    return this.prefer === 'mine' ? mine : theirs
  }

  /** Whether a node is in the result: not where both removed it, nor where one did and the other left it as it was. */
  private isKept(id: Id): boolean {
    const known = this.keptAnswers.get(id)
    if (known !== undefined) return known
    const answer = this.askKept(id)
    this.keptAnswers.set(id, answer)
    return answer
  }

  private askKept(id: Id): boolean {
    const base = this.inBase.get(id)
    const mine = this.inMine.get(id)
    const theirs = this.inTheirs.get(id)
    if (base === undefined || (mine !== undefined && theirs !== undefined)) return true
    const kept = mine ?? theirs
    if (kept === undefined) return false
    return (
      kept.list !== base.list || !same(kept.node, base.node) || this.goesWithOwner(kept, mine === undefined)
    )
  }

  /** Whether a removed node went only because the node that holds it was removed, which is kept after all. */
  private goesWithOwner(kept: Standing, removedByMine: boolean): boolean {
    if (kept.owner === null) return false
    const remover = removedByMine ? this.inMine : this.inTheirs
    return !remover.has(kept.owner) && this.isKept(kept.owner)
  }

  private node(id: Id): JsonObject | undefined {
    const base = this.inBase.get(id)
    const mine = this.inMine.get(id)
    const theirs = this.inTheirs.get(id)
    if (base !== undefined && (mine === undefined || theirs === undefined)) {
      const kept = mine ?? theirs
      if (kept !== undefined && !this.goesWithOwner(kept, mine === undefined)) {
        this.conflict({ node: id, field: '' }, 'changed and removed', base.node, mine?.node, theirs?.node)
      }
      // What is kept is the one side's node; the base no longer counts, or what that side left alone would seem removed.
      return hasContent(this.fields({ node: id }, undefined, mine?.node, theirs?.node))
    }
    if (
      mine !== undefined &&
      theirs !== undefined &&
      mine.list !== theirs.list &&
      mine.list !== base?.list &&
      theirs.list !== base?.list
    ) {
      this.conflict({ node: id, field: '' }, 'both moved', base?.list, mine.list, theirs.list)
    }
    return hasContent(this.fields({ node: id }, base?.node, mine?.node, theirs?.node))
  }

  private conflict(
    at: Holder & { field: string },
    why: Conflict['why'],
    base: unknown,
    mine: unknown,
    theirs: unknown,
  ): void {
    this.conflicts.push({ ...at, why, base, mine, theirs })
  }

  /**
   * Ids of both sides in one order: the order of the side that changed it, the other side's own nodes after their neighbour. Where
   * both or neither changed the order, the preferred side's comes first.
   */
  private order(at: Holder, field: string, base: Id[], mine: Id[], theirs: Id[]): Id[] {
    const [inBase, inMine, inTheirs] = [new Set(base), new Set(mine), new Set(theirs)]
    const common = (list: Id[]): string =>
      list.filter((id) => inBase.has(id) && inMine.has(id) && inTheirs.has(id)).join()
    const [b, m, t] = [common(base), common(mine), common(theirs)]
    if (m !== b && t !== b && m !== t) {
      this.conflict({ ...at, field }, 'both reordered', base, mine, theirs)
    }
    const mineLeads = (m !== b) === (t !== b) ? this.prefer === 'mine' : m !== b
    return mineLeads ? interleave(mine, theirs) : interleave(theirs, mine)
  }
}

/** The lead's order, with what only the other has put after the neighbour that it follows there. */
function interleave(lead: readonly Id[], other: readonly Id[]): Id[] {
  const inLead = new Set(lead)
  const after = new Map<Id | null, Id[]>()
  let neighbour: Id | null = null
  for (const id of other) {
    if (inLead.has(id)) neighbour = id
    else after.set(neighbour, [...(after.get(neighbour) ?? []), id])
  }
  return [
    ...new Set([null, ...lead].flatMap((id) => [...(id === null ? [] : [id]), ...(after.get(id) ?? [])])),
  ]
}

/** The nodes of the circle that a node hangs in, or on; none where its way up ends at the document. */
function circleFrom(id: Id, homes: ReadonlyMap<Id, Standing>): Id[] {
  const way: Id[] = []
  for (let at: Id | null = id; at !== null; at = homes.get(at)?.owner ?? null) {
    const met = way.indexOf(at)
    if (met >= 0) return way.slice(met)
    way.push(at)
  }
  return []
}

/** A list, a list item or a note of which both sides together left nothing is taken out: empty ones are not in the schema. */
function hasContent(node: JsonObject): JsonObject | undefined {
  const holdsBlocks = typeof node.type === 'string' && node.type !== 'paragraph' && isObject(node.attrs)
  return holdsBlocks && Array.isArray(node.content) && node.content.length === 0 ? undefined : node
}

function indexOf(root: JsonObject): Index {
  const index = new Map<Id, Standing>()
  const walk = (value: Json, owner: Id | null): void => {
    if (!isObject(value)) return
    for (const [field, child] of Object.entries(value)) {
      if (isKeyedList(child)) {
        for (const node of child) {
          const id = idOf(node)
          index.set(id, { owner, field, list: `${owner ?? ''}/${field}`, node })
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

/** Whether a value is an object wherever its node is; one side that has it taken away or put in anew is a change of the whole. */
function isInAll(
  base: Json | undefined,
  mine: Json | undefined,
  theirs: Json | undefined,
): base is JsonObject | undefined {
  if (base !== undefined) return isObject(base) && isObject(mine) && isObject(theirs)
  return [mine, theirs].every((side) => side === undefined || isObject(side))
}

/** A node's own id, the one in `attrs` that ProseMirror's blocks have, or a file's hash; empty for what has none. */
function idOf(node: JsonObject): Id {
  if (typeof node.id === 'string') return node.id
  if (isObject(node.attrs) && typeof node.attrs.id === 'string') return node.attrs.id
  return typeof node.sha256 === 'string' ? node.sha256 : ''
}

/** A list whose members all have an id. An empty list is one too. */
function isKeyedList(value: Json | undefined): value is JsonObject[] {
  return Array.isArray(value) && value.every((item) => isObject(item) && idOf(item) !== '')
}

function isWordList(value: Json | undefined): value is string[] {
  return Array.isArray(value) && value.every((item) => typeof item === 'string')
}

const objectOf = (value: Json | undefined): JsonObject | undefined => (isObject(value) ? value : undefined)

const wordsOf = (value: Json | undefined): string[] => (isWordList(value) ? value : [])

const nodesOf = (value: Json | undefined): JsonObject[] => (isKeyedList(value) ? value : [])

/** Whether two values have the same canonical JSON, found without writing it: merging compares every text of three documents. */
function same(a: Json | undefined, b: Json | undefined): boolean {
  if (a === b) return true
  if (Array.isArray(a))
    return Array.isArray(b) && a.length === b.length && a.every((item, index) => same(item, b[index]))
  if (!isObject(a) || !isObject(b)) return false
  const [keysOfA, keysOfB] = [a, b].map((side) => Object.keys(side).filter((key) => side[key] !== undefined))
  return keysOfA!.length === keysOfB!.length && keysOfA!.every((key) => same(a[key], b[key]))
}
