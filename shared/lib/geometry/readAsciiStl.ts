import type { StlOutcome, StlRefusal } from './stl'

/**
 * The triangles of a text STL: words in any case, any white space and line ends, several solids one after the other.
 * The name after "solid" and "endsolid" runs to the end of its line and may hold any words. Coordinates become single precision.
 * `bad-text` names the line; `truncated` means that the text ends before its "endsolid". Cost O(bytes).
 */
export function readAsciiStl(bytes: Uint8Array, limit: number): StlOutcome {
  return new AsciiReader(bytes, limit).read()
}

/** Coordinates of this many digits or fewer are exact as an integer, and the power of ten is exact too: one rounding in all. */
const EXACT_DIGITS = 15
const EXACT_POWER = 22
const POWERS = Array.from({ length: EXACT_POWER + 1 }, (_, power) => Number(`1e${power}`))
const SHOWN = 40
/** NaN and infinity as the C libraries of various systems print them, and decimal numbers too large for single precision. */
const NOT_FINITE = /^[+-]?(nan|inf|1\.#|\d+\.?\d*(e[+-]?\d+)?$)/i

const NEWLINE = 10
const SPACE = 32

class AsciiReader {
  private at = 0
  private start = 0
  private positions = new Float32Array(9 * 1024)
  private count = 0

  constructor(
    private readonly bytes: Uint8Array,
    private readonly limit: number,
  ) {}

  read(): StlOutcome {
    if (this.bytes[0] === 0xef) this.at = 3
    let open = false
    let corners = 0
    while (this.nextWord()) {
      switch (this.word()) {
        case 'solid':
          this.skipLine()
          open = true
          break
        case 'endsolid':
          this.skipLine()
          open = false
          break
        case 'facet':
          corners = 0
          // "normal" and its three numbers are not used; some writers put NaN there.
          for (let skipped = 0; skipped < 4; skipped++) this.nextWord()
          break
        case 'outer':
          this.nextWord()
          break
        case 'vertex': {
          if (corners === 3) return this.badText()
          const refusal = this.corner()
          if (refusal !== undefined) return refusal
          corners += 1
          break
        }
        case 'endloop':
          if (corners !== 3) return this.badText()
          break
        case 'endfacet':
          break
        default:
          return this.unknown()
      }
    }
    if (open || this.count % 9 !== 0) return this.truncated()
    if (this.count === 0) return { ok: false, why: 'no-facets' }
    return {
      ok: true,
      kind: 'ascii',
      positions: this.positions.slice(0, this.count),
      facets: this.count / 9,
    }
  }

  /** Three numbers into `positions`. */
  private corner(): StlRefusal | undefined {
    if (this.count % 9 === 0 && this.count / 9 >= this.limit)
      return { ok: false, why: 'too-many', facets: this.limit + 1, limit: this.limit }
    for (let axis = 0; axis < 3; axis++) {
      if (!this.nextWord()) return this.truncated()
      const value = Math.fround(this.number())
      if (value - value !== 0) {
        if (NOT_FINITE.test(this.text()))
          return { ok: false, why: 'not-finite', facet: Math.floor(this.count / 9) + 1 }
        // The last word of a file that was cut off may be half a number.
        return this.at >= this.bytes.length ? this.truncated() : this.badText()
      }
      if (this.count === this.positions.length) {
        const larger = new Float32Array(this.positions.length * 2)
        larger.set(this.positions)
        this.positions = larger
      }
      this.positions[this.count++] = value
    }
    return undefined
  }

  /** Moves to the next word; false at the end of the file. */
  private nextWord(): boolean {
    const { bytes } = this
    let at = this.at
    while (at < bytes.length && bytes[at]! <= SPACE) at++
    this.start = at
    while (at < bytes.length && bytes[at]! > SPACE) at++
    this.at = at
    return at > this.start
  }

  private text(): string {
    return new TextDecoder('latin1').decode(this.bytes.subarray(this.start, this.at))
  }

  private word(): string {
    let word = ''
    const end = Math.min(this.at, this.start + 12)
    for (let at = this.start; at < end; at++) word += String.fromCharCode(this.bytes[at]! | 0x20)
    return word
  }

  private skipLine(): void {
    // The word itself may have ended at the line's end: then its name is empty and the next line is not skipped.
    while (this.at < this.bytes.length && this.bytes[this.at] !== NEWLINE && this.bytes[this.at] !== 13)
      this.at++
  }

  /**
   * The word as a number, NaN when it is none. Digits are gathered by hand, because a string for each of nine numbers a facet is
   * slow; what has too many digits goes through `Number`, so that rounding is always to the nearest.
   */
  private number(): number {
    const { bytes } = this
    let at = this.start
    const end = this.at
    const negative = bytes[at] === 45
    if (negative || bytes[at] === 43) at++
    let digits = 0
    let value = 0
    let power = 0
    let seen = false
    for (let point = false; at < end; at++) {
      const byte = bytes[at]!
      if (byte >= 48 && byte <= 57) {
        seen = true
        if (value !== 0 || byte !== 48) digits++
        value = value * 10 + (byte - 48)
        if (point) power--
      } else if (byte === 46 && !point) point = true
      else break
    }
    if (!seen) return NaN
    if (at < end && (bytes[at]! | 0x20) === 101) {
      let exponent = 0
      at++
      const down = bytes[at] === 45
      if (down || bytes[at] === 43) at++
      if (at === end) return NaN
      for (; at < end && bytes[at]! >= 48 && bytes[at]! <= 57; at++)
        exponent = exponent * 10 + (bytes[at]! - 48)
      power += down ? -exponent : exponent
    }
    if (at < end) return NaN
    if (digits > EXACT_DIGITS || power > EXACT_POWER || power < -EXACT_POWER) return Number(this.text())
    const size = power < 0 ? value / POWERS[-power]! : value * POWERS[power]!
    return negative ? -size : size
  }

  private truncated(): StlRefusal {
    return { ok: false, why: 'truncated', promised: null, present: Math.floor(this.count / 9) }
  }

  /** A text that never held a facet is not an STL; one that did is damaged at this line. */
  private unknown(): StlRefusal {
    if (this.count === 0) return { ok: false, why: 'not-stl' }
    return this.at >= this.bytes.length ? this.truncated() : this.badText()
  }

  private badText(): StlRefusal {
    let line = 1
    for (let at = 0; at < this.start; at++) if (this.bytes[at] === NEWLINE) line++
    return { ok: false, why: 'bad-text', line, found: this.text().slice(0, SHOWN) }
  }
}
