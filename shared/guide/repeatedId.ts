import type { Id } from '../lib/ids/id'
import type { GuideDocument } from './schema'

/**
 * An id that two nodes of the document share, or undefined. Merge, comparison and translation find nodes by their ids: with a
 * repeated one they would take one node for the other. Ids count through the whole document, those of text blocks included.
 */
export function repeatedId(doc: GuideDocument): Id | undefined {
  const seen = new Set<string>()
  const walk = (value: unknown): Id | undefined => {
    if (value === null || typeof value !== 'object') return undefined
    if (Array.isArray(value)) {
      for (const item of value) {
        const id = idOf(item)
        if (id !== undefined && seen.has(id)) return id
        if (id !== undefined) seen.add(id)
        const found = walk(item)
        if (found !== undefined) return found
      }
      return undefined
    }
    for (const child of Object.values(value)) {
      const found = walk(child)
      if (found !== undefined) return found
    }
    return undefined
  }
  return walk(doc)
}

function idOf(item: unknown): string | undefined {
  if (item === null || typeof item !== 'object') return undefined
  if ('id' in item && typeof item.id === 'string') return item.id
  if ('attrs' in item && typeof item.attrs === 'object' && item.attrs !== null && 'id' in item.attrs) {
    return typeof item.attrs.id === 'string' ? item.attrs.id : undefined
  }
  return 'sha256' in item && typeof item.sha256 === 'string' ? item.sha256 : undefined
}
