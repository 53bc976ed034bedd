import type { SignalWord } from '../guide/schema'
import { plainPiece, type Piece, type Words } from './page'

const SIGNALS: [RegExp, SignalWord][] = [
  [/^(danger|gefahr|peligro|خطر|危险|危險)/i, 'danger'],
  [/^(warning|warnung|advertencia|avertissement|aviso|avvertenza|警告|تحذير)/i, 'warning'],
  [
    /^(caution|vorsicht|precaución|attention|achtung|atención|atenção|attenzione|注意|احذر|تنبيه)/i,
    'caution',
  ],
  [/^(important|notice|wichtig|importante|重要|مهم)/i, 'notice'],
]
const URGENT =
  /\b(warning|danger|caution|careful|never|do not|don't|must not|beware|hot|burn|fire|short.?circuit|polarity|injur|sharp|goggles|gloves|not\b|important)|vorsicht|achtung|nicht|cuidado|nunca|attention|jamais|注意|警告|تحذير|احذر/i

export interface FoundCaution {
  signal: SignalWord
  text: string
}

/** What a page marks as a warning: boxes by their label, and sentences whose bold words warn. They stay in the text as well. */
export function findCautions(pieces: readonly Piece[]): FoundCaution[] {
  const found: FoundCaution[] = []
  const add = (signal: SignalWord, text: string): void => {
    const told = text.replace(/\s+/g, ' ').trim().slice(0, 4000)
    if (told !== '' && found.length < 20 && !found.some((one) => one.text === told))
      found.push({ signal, text: told })
  }
  for (const piece of pieces) {
    if (piece.kind === 'paragraph') {
      const signal = boldSignal(piece.words)
      if (signal !== null) add(signal, sentenceWithBold(piece.words))
    } else if (piece.kind === 'list') {
      for (const item of piece.items) for (const one of findCautions(item)) add(one.signal, one.text)
    } else if (piece.kind === 'note') {
      const text = piece.pieces.map(plainPiece).join(' ')
      const signal = signalOf(piece.label) ?? signalOf(text)
      if (signal !== undefined) add(signal, text)
      else for (const one of findCautions(piece.pieces)) add(one.signal, one.text)
    }
  }
  return found
}

const signalOf = (text: string): SignalWord | undefined =>
  SIGNALS.find(([pattern]) => pattern.test(text.replace(/^[^\p{L}]+/u, '')))?.[1]

const isBold = (word: Words): boolean =>
  word.type === 'text' && word.marks?.some(({ type }) => type === 'strong') === true

function boldSignal(words: readonly Words[]): SignalWord | null {
  for (const word of words) {
    if (word.type !== 'text' || !isBold(word)) continue
    const signal = signalOf(word.text)
    if (signal !== undefined) return signal
    if (URGENT.test(word.text)) return 'caution'
  }
  return null
}

/** The sentence that holds the bold words, with the one after it where the bold words are no more than a label. */
function sentenceWithBold(words: readonly Words[]): string {
  const all = words.map((word) => (word.type === 'text' ? word.text : ' ')).join('')
  const bold = words.find(
    (word) =>
      word.type === 'text' && isBold(word) && (signalOf(word.text) !== undefined || URGENT.test(word.text)),
  )
  const text = bold?.type === 'text' ? bold.text.trim() : ''
  const sentences = all.split(/(?<=[.!?。！])\s+/u)
  const at = sentences.findIndex((sentence) => sentence.includes(text))
  if (at < 0) return all
  const isLabel = sentences[at]!.trim().length <= text.length + 2 && text.length < 30
  return sentences.slice(at, isLabel ? at + 2 : at + 1).join(' ')
}
