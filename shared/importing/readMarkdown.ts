import type { Element, ElementContent, Root, RootContent } from 'hast'
import rehypeRaw from 'rehype-raw'
import remarkGfm from 'remark-gfm'
import remarkParse from 'remark-parse'
import remarkRehype from 'remark-rehype'
import { unified } from 'unified'
import { plainWords, type Mark, type Page, type Picture, type Piece, type Words } from './page'

const toTree = unified()
  .use(remarkParse)
  .use(remarkGfm)
  .use(remarkRehype, { allowDangerousHtml: true })
  .use(rehypeRaw)

const BLOCKS = new Set(
  'p h1 h2 h3 h4 h5 h6 ul ol blockquote pre table hr div section article main header footer center details figure dl'.split(
    ' ',
  ),
)
const SILENT = new Set(['script', 'style', 'template', 'head', 'title', 'colgroup', 'input'])
const SUPERSCRIPT = '⁰¹²³⁴⁵⁶⁷⁸⁹'
const SUBSCRIPT = '₀₁₂₃₄₅₆₇₈₉'
/** Deeper than anybody writes; what is below is read as plain text. */
const DEEPEST = 40

/**
 * Reads a page of Markdown (CommonMark with GFM: tables, task lists, footnotes) with the raw HTML that such pages hold.
 * @throws RangeError for text nested so deeply that a reader of HTML gives up; `understand` says so to the person.
 */
export function readMarkdown(text: string): Page {
  const tree = toTree.runSync(toTree.parse(withoutFrontMatter(text)))
  const reader = new Reader()
  const pieces = joinBoxes(reader.blocks((tree as Root).children, 0))
  return { pieces, links: reader.links, left: reader.left }
}

const withoutFrontMatter = (text: string): string =>
  text.replace(/^\uFEFF/, '').replace(/^---\r?\n(?:[\w-]+:.*\r?\n|[ \t-].*\r?\n)+---\r?\n/, '')

class Reader {
  readonly links: string[] = []
  readonly left: Page['left'] = []

  blocks(nodes: readonly (RootContent | ElementContent)[], depth: number): Piece[] {
    const pieces: Piece[] = []
    let run: (RootContent | ElementContent)[] = []
    const flush = (): void => {
      pieces.push(...this.paragraph(run))
      run = []
    }
    for (const node of nodes) {
      if (node.type === 'element' && (BLOCKS.has(node.tagName) || holdsBlock(node))) {
        flush()
        pieces.push(...this.block(node, depth + 1))
      } else run.push(node)
    }
    flush()
    return pieces
  }

  private paragraph(nodes: readonly (RootContent | ElementContent)[]): Piece[] {
    const pictures: Picture[] = []
    const words = tidy(this.words(nodes, [], pictures))
    return words.length === 0 && pictures.length === 0 ? [] : [{ kind: 'paragraph', words, pictures }]
  }

  private block(node: Element, depth: number): Piece[] {
    if (depth > DEEPEST)
      return [{ kind: 'paragraph', words: tidy([{ type: 'text', text: textOf(node) }]), pictures: [] }]
    switch (node.tagName) {
      case 'h1':
      case 'h2':
      case 'h3':
      case 'h4':
      case 'h5':
      case 'h6': {
        const pictures: Picture[] = []
        const words = tidy(this.words(node.children, [], pictures))
        return [{ kind: 'heading', depth: Number(node.tagName.slice(1)), words, pictures }]
      }
      case 'ul':
      case 'ol': {
        const items = node.children
          .filter((child) => child.type === 'element')
          .map((item) => this.blocks(item.children, depth))
          .filter((item) => item.length > 0)
        return items.length === 0 ? [] : [{ kind: 'list', ordered: node.tagName === 'ol', items }]
      }
      case 'blockquote':
        return this.note(this.blocks(node.children, depth))
      case 'pre':
        return this.code(node)
      case 'table':
        return this.table(node)
      case 'hr':
        return [{ kind: 'rule' }]
      default:
        return this.blocks(node.children, depth)
    }
  }

  /** A quotation; one that begins with [!WARNING] or "Warning:" has this label. */
  private note(pieces: Piece[]): Piece[] {
    const first = pieces[0]
    if (first?.kind !== 'paragraph') return pieces.length === 0 ? [] : [{ kind: 'note', label: '', pieces }]
    const marked = /^\s*\[!(\w+)\]\s*/.exec(plainWords(first.words))
    if (marked === null) return [{ kind: 'note', label: '', pieces }]
    const words = tidy(withoutStart(first.words, marked[0].trim()))
    const rest =
      words.length === 0 && first.pictures.length === 0
        ? pieces.slice(1)
        : [{ ...first, words }, ...pieces.slice(1)]
    return rest.length === 0 ? [] : [{ kind: 'note', label: marked[1]!.toLowerCase(), pieces: rest }]
  }

  private code(node: Element): Piece[] {
    const inner = node.children.find((child) => child.type === 'element')
    const names = inner?.properties['className']
    const language = Array.isArray(names) ? String(names[0] ?? '').replace('language-', '') : ''
    const text = textOf(node).replace(/\n$/, '')
    if (text.trim() === '') return []
    if (/^(mermaid|plantuml|dot|graphviz)$/.test(language)) {
      this.left.push({
        what: text.slice(0, 200),
        why: 'A drawing written as code cannot be shown. Save it as a picture and bring that.',
      })
      return []
    }
    return [{ kind: 'code', text, language }]
  }

  private table(node: Element): Piece[] {
    const pictures: Picture[] = []
    const cells = rowsOf(node).map((row) =>
      row.children
        .filter((cell) => cell.type === 'element')
        .map((cell) => cellText(this.words(cell.children, [], pictures))),
    )
    return cells.length === 0 ? [] : [{ kind: 'table', cells, pictures }]
  }

  private words(
    nodes: readonly (RootContent | ElementContent)[],
    marks: Mark[],
    pictures: Picture[],
  ): Words[] {
    return nodes.flatMap((node): Words[] => {
      if (node.type === 'text')
        return [{ type: 'text', text: node.value, ...(marks.length > 0 ? { marks } : {}) }]
      if (node.type !== 'element' || SILENT.has(node.tagName)) return []
      const within = (mark?: Mark): Words[] =>
        this.words(
          node.children,
          mark === undefined || hasMark(marks, mark) ? marks : [...marks, mark],
          pictures,
        )
      switch (node.tagName) {
        case 'strong':
        case 'b':
          return within({ type: 'strong' })
        case 'em':
        case 'i':
          return within({ type: 'emphasis' })
        case 'code':
        case 'kbd':
          return within({ type: 'code' })
        case 'br':
          return [{ type: 'lineBreak' }]
        case 'sup':
        case 'sub':
          return [raised(textOf(node), node.tagName === 'sup' ? SUPERSCRIPT : SUBSCRIPT, marks)]
        case 'img':
          pictures.push(pictureOf(node))
          return []
        case 'video':
        case 'iframe':
        case 'audio': {
          const address = String(node.properties['src'] ?? textOf(node))
          this.left.push({
            what: address,
            why: 'A film cannot be shown in a guide. Link to it from the text.',
          })
          return []
        }
        case 'a': {
          const href = String(node.properties['href'] ?? '').trim()
          if (href === '') return within()
          this.links.push(href)
          const mark: Mark = { type: 'link', attrs: { href } }
          return within(mark)
        }
        default:
          return BLOCKS.has(node.tagName) || node.tagName === 'li'
            ? [...within(), { type: 'lineBreak' }]
            : within()
      }
    })
  }
}

const hasMark = (marks: readonly Mark[], mark: Mark): boolean => marks.some(({ type }) => type === mark.type)

function holdsBlock(node: Element): boolean {
  return (
    !/^(a|code|kbd|b|i|em|strong)$/.test(node.tagName) &&
    node.children.some((child) => child.type === 'element' && BLOCKS.has(child.tagName))
  )
}

function pictureOf(node: Element): Picture {
  const text = (name: string): string => String(node.properties[name] ?? '').trim()
  return { address: text('src'), alt: text('alt'), title: text('title') }
}

function rowsOf(node: Element): Element[] {
  return node.children.flatMap((child) =>
    child.type !== 'element' ? [] : child.tagName === 'tr' ? [child] : rowsOf(child),
  )
}

function textOf(node: Element): string {
  let text = ''
  const waiting: (Element | ElementContent)[] = [node]
  for (let next = waiting.pop(); next !== undefined; next = waiting.pop()) {
    if (next.type === 'text') text += next.value
    else if (next.type === 'element') for (const child of next.children.toReversed()) waiting.push(child)
  }
  return text
}

/** A footnote's mark keeps its place over the line, so that "camera2" is not read. */
function raised(text: string, digits: string, marks: Mark[]): Words {
  const shown = /^\s*\d+\s*$/.test(text)
    ? text.trim().replace(/\d/g, (digit) => digits[Number(digit)]!)
    : text
  return { type: 'text', text: shown, ...(marks.length > 0 ? { marks } : {}) }
}

/** Joins what belongs together, one space where HTML has any white space, no breaks at the ends. */
export function tidy(words: readonly Words[]): Words[] {
  const joined: Words[] = []
  for (const word of words) {
    const last = joined.at(-1)
    if (word.type === 'lineBreak') {
      if (last?.type === 'text') joined.push(word)
      continue
    }
    let text = word.text.replace(/[ \t\r\n\f]+/g, ' ')
    if (last === undefined || last.type === 'lineBreak' || last.text.endsWith(' '))
      text = text.replace(/^ /, '')
    if (text === '') continue
    if (last?.type === 'text' && sameMarks(last.marks, word.marks)) {
      joined[joined.length - 1] = { ...last, text: last.text + text }
    } else joined.push({ ...word, text })
  }
  for (let last = joined.at(-1); last !== undefined; last = joined.at(-1)) {
    if (last.type === 'lineBreak') joined.pop()
    else if (last.text.trimEnd() === '') joined.pop()
    else {
      joined[joined.length - 1] = { ...last, text: last.text.trimEnd() }
      break
    }
  }
  return joined
}

const sameMarks = (a: readonly Mark[] = [], b: readonly Mark[] = []): boolean =>
  JSON.stringify(a) === JSON.stringify(b)

/** Takes these letters off the start, whichever marks they have. */
export function withoutStart(words: readonly Words[], start: string): Words[] {
  let left = start.replace(/\s/g, '').length
  return words.flatMap((word): Words[] => {
    if (left <= 0) return [word]
    if (word.type === 'lineBreak') return []
    let at = 0
    while (at < word.text.length && left > 0) {
      if (!/\s/.test(word.text[at]!)) left -= 1
      at += 1
    }
    const rest = word.text.slice(at)
    return rest === '' ? [] : [{ ...word, text: rest }]
  })
}

/** A cell as one line: links as `[text](address)`, breaks as "; ". */
function cellText(words: readonly Words[]): string {
  return tidy(words)
    .map((word) => {
      if (word.type === 'lineBreak') return '; '
      const link = word.marks?.find((mark) => mark.type === 'link')
      return link === undefined || word.text.trim() === ''
        ? word.text
        : `[${word.text.trim()}](${link.attrs.href})`
    })
    .join('')
    .replace(/\s+/g, ' ')
    .trim()
}

/** `!!! warning "Hot"` and the indented text under it, which CommonMark reads as a paragraph and code. */
function joinBoxes(pieces: readonly Piece[]): Piece[] {
  const joined: Piece[] = []
  for (let at = 0; at < pieces.length; at += 1) {
    const piece = pieces[at]!
    const opened =
      piece.kind === 'paragraph'
        ? /^!!!\s*(\w+)\s*(?:["“]([^"”]*)["”])?\s*(.*)$/.exec(plainWords(piece.words))
        : null
    if (opened === null) {
      joined.push(piece)
      continue
    }
    const [, label = '', title = '', rest = ''] = opened
    const inner = pieces[at + 1]
    const text = [title, rest, inner?.kind === 'code' ? inner.text : '']
      .filter((part) => part !== '')
      .join('. ')
    if (inner?.kind === 'code') at += 1
    if (text !== '') {
      const words = tidy([{ type: 'text', text }])
      joined.push({
        kind: 'note',
        label: label.toLowerCase(),
        pieces: [{ kind: 'paragraph', words, pictures: [] }],
      })
    }
  }
  return joined
}
