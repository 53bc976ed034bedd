import type { Conflict } from './merge'
import type { GuideDocument } from './schema'

type Json = null | boolean | number | string | Json[] | JsonObject
interface JsonObject {
  [key: string]: Json
}

/**
 * Puts what a conflict kept of `mine` (or `theirs`) into a document, which may have moved on since. The document of a merge holds
 * `theirs` already, but for a node that one side changed and the other removed: that one it keeps, whoever changed it.
 * @returns undefined where the place is gone, so that there is nothing to put it into.
 */
export function settle(
  doc: GuideDocument,
  conflict: Conflict,
  keep: 'mine' | 'theirs',
): GuideDocument | undefined {
  const next = structuredClone(doc) as unknown as JsonObject
  const done = putInto(next, conflict, keep)
  if (done === 'nothing to do') return doc
  return done
    ? ((conflict.node === null && conflict.field === '' ? conflict[keep] : next) as unknown as GuideDocument)
    : undefined
}

function putInto(doc: JsonObject, conflict: Conflict, keep: 'mine' | 'theirs'): boolean | 'nothing to do' {
  const value = conflict[keep] as Json | undefined
  switch (conflict.why) {
    case 'changed and removed':
      return value === undefined && conflict.node !== null
        ? takeOut(doc, conflict.node) !== undefined
        : 'nothing to do'
    case 'both changed':
      return keep === 'theirs' ? 'nothing to do' : setField(doc, conflict, value)
    case 'both moved':
      return keep === 'theirs' || typeof value !== 'string' ? 'nothing to do' : moveTo(doc, conflict, value)
    case 'both reordered':
      return keep === 'theirs' || !Array.isArray(value) ? 'nothing to do' : reorder(doc, conflict, value)
  }
}

/** The value at a conflict's place in some document; undefined where there is none. */
export function valueAt(doc: GuideDocument, conflict: Conflict): unknown {
  const root = doc as unknown as JsonObject
  if (conflict.field === '') {
    return conflict.why === 'both moved' ? listOf(root, conflict.node) : find(root, conflict.node)
  }
  return holderOf(root, conflict)?.[conflict.field]
}

function setField(doc: JsonObject, conflict: Conflict, value: Json | undefined): boolean {
  // A conflict about the document as a whole: `settle` takes the kept document itself.
  if (conflict.node === null && conflict.field === '') return true
  const holder = holderOf(doc, conflict)
  if (holder === undefined) return false
  if (value === undefined) Reflect.deleteProperty(holder, conflict.field)
  else holder[conflict.field] = value
  return true
}

function moveTo(doc: JsonObject, conflict: Conflict, list: string): boolean {
  const slash = list.lastIndexOf('/')
  const owner = slash === 0 ? null : list.slice(0, slash)
  const target = listIn(doc, owner, list.slice(slash + 1))
  if (target === undefined || conflict.node === null) return false
  const node = takeOut(doc, conflict.node)
  if (node === undefined) return false
  target.push(node)
  return true
}

function reorder(doc: JsonObject, conflict: Conflict, order: Json[]): boolean {
  const list = holderOf(doc, conflict)?.[conflict.field]
  if (!Array.isArray(list)) return false
  const wanted = order.filter((id) => list.some((item) => idOf(item) === id))
  const places = list.flatMap((item, index) => (wanted.includes(idOf(item)) ? [index] : []))
  const byId = new Map(list.map((item) => [idOf(item), item]))
  places.forEach((place, index) => (list[place] = byId.get(String(wanted[index]))!))
  return true
}

function holderOf(doc: JsonObject, conflict: Conflict): JsonObject | undefined {
  const node = find(doc, conflict.node)
  if (node === undefined || conflict.within === undefined) return node
  const inner = node[conflict.within]
  return isObject(inner) ? inner : undefined
}

function find(value: Json, id: string | null): JsonObject | undefined {
  if (id === null) return isObject(value) ? value : undefined
  if (isObject(value) && idOf(value) === id) return value
  for (const child of Array.isArray(value) ? value : isObject(value) ? Object.values(value) : []) {
    const found = find(child, id)
    if (found !== undefined) return found
  }
  return undefined
}

/** The list of this name that belongs to a node, in the node or in an object of it that has no id of its own. */
function listIn(doc: JsonObject, owner: string | null, field: string): Json[] | undefined {
  const node = find(doc, owner)
  if (node === undefined) return undefined
  for (const holder of [node, ...Object.values(node)]) {
    const list = isObject(holder) ? holder[field] : undefined
    if (Array.isArray(list)) return list
  }
  return undefined
}

/** "owner/field" of the list in which a node stands, as a merge names it. */
function listOf(doc: JsonObject, id: string | null): string | undefined {
  const walk = (value: Json, owner: string): string | undefined => {
    if (!isObject(value)) return undefined
    for (const [field, child] of Object.entries(value)) {
      if (Array.isArray(child)) {
        if (child.some((item) => isObject(item) && idOf(item) === id)) return `${owner}/${field}`
        for (const item of child) {
          const found = isObject(item) ? walk(item, idOf(item)) : undefined
          if (found !== undefined) return found
        }
      } else {
        const found = walk(child, owner)
        if (found !== undefined) return found
      }
    }
    return undefined
  }
  return walk(doc, '')
}

function takeOut(value: Json, id: string): Json | undefined {
  if (Array.isArray(value)) {
    const at = value.findIndex((item) => isObject(item) && idOf(item) === id)
    if (at >= 0) return value.splice(at, 1)[0]
  }
  for (const child of Array.isArray(value) ? value : isObject(value) ? Object.values(value) : []) {
    const taken = takeOut(child, id)
    if (taken !== undefined) return taken
  }
  return undefined
}

const isObject = (value: Json | undefined): value is JsonObject =>
  value !== null && typeof value === 'object' && !Array.isArray(value)

/** The id of a node, of a block of text (in `attrs`), of a file (its hash); a word is its own. */
function idOf(item: Json): string {
  if (typeof item === 'string') return item
  if (!isObject(item)) return ''
  if (typeof item['id'] === 'string') return item['id']
  if (isObject(item['attrs']) && typeof item['attrs']['id'] === 'string') return item['attrs']['id']
  return typeof item['sha256'] === 'string' ? item['sha256'] : ''
}
