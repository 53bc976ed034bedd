import { findMinutes } from './findMinutes'
import { picturesOf, plainPiece, plainWords, type Piece, type Words } from './page'
import { tidy, withoutStart } from './readMarkdown'
import { bareTitle, isAside, isNumbered, isPartsTitle, isToolsTitle } from './titles'

/** A step to be: its title and what stands in it. `include` is the suggestion that a person sees ticked. */
export interface Portion {
  title: string
  pieces: Piece[]
  include: boolean
  /** Whether the page itself sets it out as a step, by a number, bold words or a picture; not only by a heading. */
  isSetOut?: boolean
}

/** What a page divides into. `parts` and `tools` are what stands under such headings. */
export interface Division {
  title: string
  sections: { title: string; portions: Portion[] }[]
  parts: { title: string; pieces: Piece[] }[]
  tools: Piece[]
  /** How the steps were found; null where the page has none. */
  by: 'numbered headings' | 'numbered lists' | 'bold words' | 'headings' | 'pictures' | null
}

interface Part {
  /** Nought for what stands before any heading. */
  depth: number
  title: string
  above: string[]
  pieces: Piece[]
}

/**
 * Divides a page into sections and steps: numbered headings are steps; else the items of numbered lists; else paragraphs that begin
 * with bold words; else the lowest headings; else pairs of picture and text. It is a guess, which the person sees and may change.
 */
export function divide(pieces: readonly Piece[], fallbackTitle: string): Division {
  const parts = partsOf(pieces)
  const title = titleOf(parts) ?? fallbackTitle
  const division: Division = { title, sections: [], parts: [], tools: [], by: null }
  const building: Part[] = []
  for (const part of parts) {
    const about = [part.title, ...part.above]
    if (about.some(isToolsTitle) && !isNumbered(part.title)) division.tools.push(...part.pieces)
    else if (isPartsTitle(part.title) || (part.above.some(isPartsTitle) && !isNumbered(part.title))) {
      division.parts.push({ title: part.title, pieces: part.pieces })
    } else building.push(part)
  }
  const stepDepth = numberedDepth(building)
  division.by = stepDepth !== null ? 'numbered headings' : ruleFor(building)
  if (stepDepth !== null) byHeadings(division, building, stepDepth)
  else for (const part of building) addPart(division, part, parts.length === 1)
  return division
}

function partsOf(pieces: readonly Piece[]): Part[] {
  const parts: Part[] = [{ depth: 0, title: '', above: [], pieces: [] }]
  const above: { depth: number; title: string }[] = []
  for (const piece of pieces) {
    if (piece.kind !== 'heading') {
      parts.at(-1)!.pieces.push(piece)
      continue
    }
    while (above.length > 0 && above.at(-1)!.depth >= piece.depth) above.pop()
    const title = plainWords(piece.words)
    const shown: Piece[] =
      piece.pictures.length > 0 ? [{ kind: 'paragraph', words: [], pictures: piece.pictures }] : []
    if (title === '') parts.at(-1)!.pieces.push(...shown)
    else {
      parts.push({ depth: piece.depth, title, above: above.map((one) => one.title), pieces: shown })
      above.push({ depth: piece.depth, title })
    }
  }
  return parts.filter((part) => part.depth > 0 || part.pieces.length > 0)
}

/** The first heading, if nothing but a few pictures stands before it and it is not a step itself. */
function titleOf(parts: readonly Part[]): string | undefined {
  const first = parts.find(({ depth }) => depth > 0)
  return first === undefined || isNumbered(first.title) || isPartsTitle(first.title)
    ? undefined
    : bareTitle(first.title)
}

/** The depth at which at least two headings are numbered. */
function numberedDepth(parts: readonly Part[]): number | null {
  const counts = new Map<number, number>()
  for (const { depth, title } of parts) if (isNumbered(title)) counts.set(depth, (counts.get(depth) ?? 0) + 1)
  const depths = [...counts].filter(([, count]) => count >= 2).map(([depth]) => depth)
  return depths.length === 0 ? null : Math.min(...depths)
}

/** Steps are the headings of this depth under a heading that has a numbered one; what is below them belongs to them. */
function byHeadings(division: Division, parts: readonly Part[], depth: number): void {
  const numberedUnder = new Set(
    parts.filter((part) => part.depth === depth && isNumbered(part.title)).map(parentOf),
  )
  let open: Portion | null = null
  for (const part of parts) {
    if (part.depth > depth && open !== null) {
      open.pieces.push(subheading(part.title), ...part.pieces)
      continue
    }
    open = null
    const isStep = part.depth === depth && numberedUnder.has(parentOf(part))
    const portion = {
      title: bareTitle(part.title || division.title),
      pieces: part.pieces,
      include: isStep && !isAside(part.title),
    }
    if (isStep) open = portion
    if (isStep || holdsText(part.pieces)) sectionFor(division, part).push(portion)
  }
}

const parentOf = (part: Part): string => part.above.join('\n')

const subheading = (title: string): Piece => ({
  kind: 'paragraph',
  words: [{ type: 'text', text: title, marks: [{ type: 'strong' }] }],
  pictures: [],
})

const holdsText = (pieces: readonly Piece[]): boolean =>
  picturesOf(pieces).length > 0 || pieces.some((piece) => plainPiece(piece) !== '')

/** Portions of one parent heading stand together. */
function sectionFor(division: Division, part: Part, own = false): Portion[] {
  const title = bareTitle((own && part.title !== '' ? part.title : part.above.at(-1)) ?? division.title)
  const same = division.sections.find((section) => section.title === title)
  if (same !== undefined) return same.portions
  const section = { title, portions: [] }
  division.sections.push(section)
  return section.portions
}

const numberedItems = (part: Part): number =>
  part.pieces.reduce(
    (count, piece) => count + (piece.kind === 'list' && piece.ordered ? piece.items.length : 0),
    0,
  )

function ruleFor(parts: readonly Part[]): Division['by'] {
  const told = parts.filter((part) => !isAside(part.title))
  if (told.some((part) => numberedItems(part) >= 3)) return 'numbered lists'
  if (told.some((part) => part.pieces.filter(isRunIn).length >= 2)) return 'bold words'
  if (told.some((part) => part.depth > 0 && part.above.length > 0 && holdsText(part.pieces)))
    return 'headings'
  return told.some((part) => pairs(part.pieces).length >= 2)
    ? 'pictures'
    : told.some((part) => holdsText(part.pieces))
      ? 'headings'
      : null
}

function addPart(division: Division, part: Part, isAll: boolean): void {
  if (!holdsText(part.pieces)) return
  const aside = isAside(part.title)
  const isIntroduction =
    part.depth === 0 || (part.above.length === 0 && bareTitle(part.title) === division.title)
  if (!aside && numberedItems(part) >= 2) return addTo(sectionFor(division, part, true), byItems(part))
  if (!aside && part.pieces.filter(isRunIn).length >= 2)
    return addTo(sectionFor(division, part, true), byRunIns(part))
  const isBuild =
    /^\W*(build(ing)?|assembly|construction|montage|zusammenbau|aufbau|组装|montaje|montagem)( procedure| instructions| steps| process)?\W*$/i.test(
      part.title,
    )
  if (!aside && (division.by === 'pictures' || isBuild) && pairs(part.pieces).length >= 2) {
    return addTo(sectionFor(division, part, true), pairs(part.pieces))
  }
  sectionFor(division, part).push({
    title: bareTitle(part.title || division.title),
    pieces: part.pieces,
    include: !aside && !(isIntroduction && !isAll) && division.by !== null,
  })
}

const addTo = (portions: Portion[], more: readonly Portion[]): void => {
  portions.push(...more.map((portion) => ({ ...portion, isSetOut: portion.include })))
}

/** Each item is a step; what stands before the first goes with it, what stands after one with that one. */
function byItems(part: Part): Portion[] {
  const portions: Portion[] = []
  let before: Piece[] = []
  for (const piece of part.pieces) {
    if (piece.kind === 'list' && piece.ordered) {
      for (const item of piece.items) {
        portions.push({ ...titled(item), pieces: [...before, ...titled(item).pieces], include: true })
        before = []
      }
    } else if (portions.length === 0) before.push(piece)
    else portions.at(-1)!.pieces.push(piece)
  }
  return portions
}

/** The title of an item: its bold beginning, else its first sentence, which then stays in the text as well. */
function titled(pieces: readonly Piece[]): { title: string; pieces: Piece[] } {
  const first = pieces[0]
  if (first?.kind !== 'paragraph')
    return {
      title: bareTitle(firstSentence(first === undefined ? '' : plainPiece(first))),
      pieces: [...pieces],
    }
  const bold = boldStart(first.words)
  if (bold === null) return { title: bareTitle(firstSentence(plainWords(first.words))), pieces: [...pieces] }
  const rest = tidy(withoutStart(first.words, bold))
  const kept: Piece[] = rest.length === 0 && first.pictures.length === 0 ? [] : [{ ...first, words: rest }]
  return { title: bareTitle(bold.replace(/[.:]\s*$/, '')), pieces: [...kept, ...pieces.slice(1)] }
}

/** Bold words at the start of a text, with the stop behind them. */
function boldStart(words: readonly Words[]): string | null {
  const [first, second] = words
  if (first?.type !== 'text' || first.marks?.some(({ type }) => type === 'strong') !== true) return null
  const text = first.text.trim()
  if (text.length < 3 || text.length > 80) return null
  if (/[.:]$/.test(text)) return text
  if (second?.type === 'text' && /^\s*[:.–-]/.test(second.text)) return text + second.text.trim()[0]!
  return null
}

const isRunIn = (piece: Piece): boolean =>
  piece.kind === 'paragraph' &&
  boldStart(piece.words) !== null &&
  plainWords(piece.words).length > (boldStart(piece.words)?.length ?? 0) + 10

function byRunIns(part: Part): Portion[] {
  const portions: Portion[] = []
  const before: Piece[] = []
  for (const piece of part.pieces) {
    if (isRunIn(piece)) portions.push({ ...titled([piece]), include: true })
    else if (portions.length === 0) before.push(piece)
    else portions.at(-1)!.pieces.push(piece)
  }
  return before.length === 0
    ? portions
    : [{ title: bareTitle(part.title || 'Introduction'), pieces: before, include: false }, ...portions]
}

/** A picture with the text beside it, or each text and the pictures up to the next. */
function pairs(pieces: readonly Piece[]): Portion[] {
  const portions: Portion[] = []
  let texts: Piece[] = []
  let shown = false
  const close = (): void => {
    const text = texts.map(plainPiece).find((one) => one !== '' && findMinutes(one) === undefined)
    if (shown && text !== undefined)
      portions.push({ title: firstSentence(text), pieces: texts, include: true })
    else if (texts.length > 0 && portions.length > 0) portions.at(-1)!.pieces.push(...texts)
    else if (texts.length > 0) return
    texts = []
    shown = false
  }
  for (const piece of pieces) {
    if (
      piece.kind === 'rule' ||
      (shown && plainPiece(piece) !== '' && texts.some((one) => plainPiece(one) !== ''))
    )
      close()
    if (piece.kind === 'rule') continue
    texts.push(piece)
    shown = shown || picturesOf([piece]).length > 0
  }
  if (texts.length > 0) close()
  return portions
}

/** The first sentence as a title, cut at a word where it is long. */
export function firstSentence(text: string): string {
  const plain = text.replace(/\s+/g, ' ').trim()
  const sentence = /^.{8,}?[.!?。](?=\s|$)/u.exec(plain)?.[0] ?? plain
  const bare = sentence.replace(/[.。:]$/, '')
  if (bare.length <= 90) return bare
  return `${bare.slice(0, 88).replace(/\s+\S*$/, '')} …`
}
