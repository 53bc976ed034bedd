/** Where an address in a page leads: to a file that was brought, to one that was not, or elsewhere. */
export type Found = { state: 'found' | 'missing' | 'remote'; path: string }

/**
 * Finds what a page means by an address among the files that were brought. Paths may be encoded ("%20"), begin with "/" for the top of
 * the design, go up by "..", or be the design's own address on a site that keeps repositories, which is mapped to the file beside.
 * @param from the page's own path.
 */
export function findFile(address: string, from: string, paths: ReadonlySet<string>): Found {
  const bare = decoded(address.replace(/[?#].*$/, ''))
  if (/^(https?:)?\/\//i.test(address)) {
    const beside = ownFile(bare, paths)
    return beside === undefined ? { state: 'remote', path: address } : { state: 'found', path: beside }
  }
  if (/^[a-z][a-z0-9+.-]*:/i.test(address)) return { state: 'remote', path: address.slice(0, 2000) }
  const folder = from.split('/').slice(0, -1)
  const joined = bare.startsWith('/') ? join(topOf(from, paths), bare.slice(1)) : join(folder, bare)
  const found = sameFile(joined, paths)
  return found === undefined ? { state: 'missing', path: joined || bare } : { state: 'found', path: found }
}

function decoded(text: string): string {
  try {
    return decodeURIComponent(text).replace(/\\/g, '/')
  } catch (error) {
    // A stray per cent sign: the address is meant as it stands.
    if (error instanceof URIError) return text
    throw error
  }
}

function join(folder: readonly string[], relative: string): string {
  const parts = [...folder]
  for (const part of relative.split('/')) {
    if (part === '..') parts.pop()
    else if (part !== '' && part !== '.') parts.push(part)
  }
  return parts.join('/')
}

/** The folder that holds everything, where a design was brought as one. */
function topOf(from: string, paths: ReadonlySet<string>): string[] {
  const first = from.includes('/') ? from.split('/')[0]! : ''
  return first !== '' && [...paths].every((path) => path.startsWith(`${first}/`)) ? [first] : []
}

/** Names that differ only by case or by Unicode form are one file: pages are often written where that makes no difference. */
function sameFile(path: string, paths: ReadonlySet<string>): string | undefined {
  if (paths.has(path)) return path
  const plain = (text: string): string => text.normalize('NFC').toLowerCase()
  return [...paths].find((other) => plain(other) === plain(path))
}

/** ".../owner/name/blob/branch/Images/x.jpg" → "Images/x.jpg", where that was brought. */
function ownFile(address: string, paths: ReadonlySet<string>): string | undefined {
  const parts = address.replace(/^(https?:)?\/\//i, '').split('/')
  const branch = parts.findIndex((part) => /^(blob|raw|tree)$/.test(part))
  if (branch < 1 && !/^raw\./.test(parts[0] ?? '')) return undefined
  const first = branch < 1 ? 4 : branch + 2
  for (let at = first; at < parts.length; at += 1) {
    const rest = parts.slice(at).join('/').toLowerCase()
    const matches = [...paths].filter(
      (path) => path.toLowerCase() === rest || path.toLowerCase().endsWith(`/${rest}`),
    )
    if (matches.length === 1) return matches[0]
  }
  return undefined
}
