import type { Quantity } from '../guide/schema'
import { picturesOf, plainPiece, plainWords, type Piece } from './page'
import { plainCell, quantityOf } from './readTable'
import { isPartsLabel } from './titles'

/** A part that a text names with its number. `sentence` is null where it stood in a list of parts. */
export interface FoundUse {
  name: string
  typed: string
  quantity: Quantity | null
  sentence: string | null
}

const HEADS =
  'screws?|bolts?|nuts?|washers?|bearings?|magnets?|rods?|pins?|spacers?|stand-?offs?|inserts?|springs?|zip ?ties|cable ties|rivets?|o-rings?|set ?screws?|grub screws?|dowels?|nails?|brackets?|' +
  'schrauben?|muttern?|scheiben?|tornillos?|tuercas?|arandelas?|vis|écrous?|rondelles?|parafusos?|porcas?|arruelas?|viti|dadi|rondelle'
const NUMBER_WORDS: Record<string, string> = {
  one: '1',
  two: '2',
  three: '3',
  four: '4',
  five: '5',
  six: '6',
  seven: '7',
  eight: '8',
  nine: '9',
  ten: '10',
  twelve: '12',
}
const IN_SENTENCE = new RegExp(
  String.raw`(?<![\p{L}\p{N}.,/-])(\d{1,3}|${Object.keys(NUMBER_WORDS).join('|')})\s*[x×*]?\s+((?:[\p{L}\p{N}.,/"-]+\s+){0,4}?(?:${HEADS}))(?![\p{L}\p{N}-])`,
  'giu',
)

/** "using 4 m2x5 tap screws" → 4 × "m2x5 tap screws". Only fasteners and the like: other numbers in a text mean other things. */
export function usesInText(text: string): FoundUse[] {
  return sentencesOf(text).flatMap((sentence) =>
    [...sentence.matchAll(IN_SENTENCE)].flatMap((match): FoundUse[] => {
      const typed = match[1]!
      const name = match[2]!.replace(/\s+/g, ' ')
      // "3 of the screws", "2 holes and screws": the words between belong to something else.
      if (
        /\b(of|and|the|with|in|to|on|for|from|holes?|times|mm|cm|hours?|minutes?|und|mit|y|et)\b/i.test(name)
      )
        return []
      const quantity = quantityOf(NUMBER_WORDS[typed.toLowerCase()] ?? typed)
      return quantity === undefined
        ? []
        : [{ name, typed: `${typed} ${name}`.slice(0, 200), quantity, sentence: sentence.slice(0, 4000) }]
    }),
  )
}

const sentencesOf = (text: string): string[] =>
  text
    .slice(0, 100_000)
    .split(/(?<=[.!?。])\s+|\n/u)
    .map((sentence) => sentence.trim())
    .filter((sentence) => sentence !== '')

const ITEM =
  /^(?:approx\.?|about|roughly|ca\.?)?\s*(\d+(?:[.,/]\d+)?|[½¼¾])\s*(?:([x×*])\s*|(pcs?\.?|pieces?|m|mm|cm|g|kg|ml|l|meter|metre|meters|metres|sets?|pairs?|Stück)\b\s*(?:of\s+)?)?\s*(.+)$/iu

/** An item of a list of parts: "32 * M3x8mm bolts", "0.6 m Wooden beam", "A plastic hosetail". Without a number there is no quantity. */
export function useOfItem(text: string): FoundUse | undefined {
  const plain = plainCell(text)
  if (plain === '') return undefined
  const [, number, , unit, rest] = ITEM.exec(plain) ?? []
  // "3D printed case", "110 mm PVC cap", "18650 cell": the number belongs to the name.
  const isName =
    number === undefined ||
    rest === undefined ||
    /^(d\b|mm\b|cm\b|v\b|ah?\b)/i.test(rest) ||
    (unit === undefined && Number(number) > 999) ||
    /^(mm|cm)$/i.test(unit ?? '')
  if (isName) {
    const name = plain.replace(/^(an?|the|some|ein(e|en)?|une?|una?|um|uma)\s+/i, '')
    const single = /^an?\s/i.test(plain)
    return {
      name,
      typed: single ? plain.slice(0, plain.indexOf(' ')) : '',
      quantity: single ? (quantityOf('1') ?? null) : null,
      sentence: null,
    }
  }
  const typed = `${number}${unit === undefined ? '' : ` ${unit}`}`
  return { name: rest.trim(), typed, quantity: quantityOf(typed) ?? null, sentence: null }
}

/** Takes lists under "**Parts:**" out of a step. */
export function takeParts(pieces: readonly Piece[]): { uses: FoundUse[]; rest: Piece[] } {
  const uses: FoundUse[] = []
  const rest: Piece[] = []
  for (let at = 0; at < pieces.length; at += 1) {
    const piece = pieces[at]!
    const list = pieces[at + 1]
    if (
      piece.kind === 'paragraph' &&
      piece.pictures.length === 0 &&
      list?.kind === 'list' &&
      isPartsLabel(plainWords(piece.words))
    ) {
      uses.push(...usesOfList(list))
      const shown = picturesOf([list])
      if (shown.length > 0) rest.push({ kind: 'paragraph', words: [], pictures: shown })
      at += 1
    } else rest.push(piece)
  }
  return { uses, rest }
}

export const usesOfList = (list: Extract<Piece, { kind: 'list' }>): FoundUse[] =>
  list.items.flatMap((item) => useOfItem(item.map(plainPiece).join(' ')) ?? [])

/** By which names are compared: lower case, no plural, no punctuation, "M3 x 8 mm" as "m3x8". */
export const nameKey = (name: string): string =>
  name
    .normalize('NFKC')
    .toLowerCase()
    .replace(/\.(stl|3mf|obj)$/, '')
    .replace(/(\d)\s*(?:mm)?\s*[x×*]\s*(\d)/g, '$1x$2')
    .replace(/(x\d+(?:[.,]\d+)?)\s*mm\b/g, '$1')
    .replace(/[^\p{L}\p{N}.]+/gu, ' ')
    .replace(/(\p{L}{3,})s\b/gu, '$1')
    .trim()
