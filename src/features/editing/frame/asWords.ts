/** Keys whose words tell a node apart best, in this order. */
const TELLING = [
  'title',
  'text',
  'hazard',
  'avoid',
  'name',
  'label',
  'caption',
  'value',
  'content',
  'part',
  'options',
  'steps',
]

/**
 * Any value of a document as words for a person to compare: texts as they are, rich text block by block, nodes by what they say.
 * Ids and types are left out.
 */
export function asWords(value: unknown): string {
  if (value === null || value === undefined) return ''
  if (typeof value === 'string') return value
  if (typeof value === 'number' || typeof value === 'boolean') return String(value)
  if (Array.isArray(value)) {
    const parts = value.map(asWords).filter((part) => part !== '')
    return parts.join(value.some(isInline) ? '' : '\n')
  }
  if (typeof value !== 'object') return ''
  const node = value as Record<string, unknown>
  if (typeof node.value === 'string' && typeof node.unit === 'string') return quantity(node)
  if (node.type === 'quantity') return asWords(node.attrs)
  const parts = TELLING.map((key) => asWords(node[key])).filter((part) => part !== '')
  return parts.join('\n')
}

const isInline = (value: unknown): boolean =>
  typeof value === 'object' &&
  value !== null &&
  ['text', 'quantity', 'balloon', 'lineBreak'].includes(String((value as { type?: unknown }).type))

const quantity = (node: Record<string, unknown>): string =>
  node.unit === 'each' || node.unit === 'one'
    ? String(node.value)
    : `${String(node.value)} ${String(node.unit)}`
