import fc from 'fast-check'

/** A row of numbers from which a maker takes its decisions. When it is used up every draw is 0, so that makers come to an end. */
export class Draws {
  private at = 0
  constructor(private readonly numbers: readonly number[]) {}

  /** A whole number from 0 to below `count`. */
  below(count: number): number {
    const number = this.numbers[this.at] ?? 0
    this.at += 1
    return count <= 1 ? 0 : number % count
  }
  of<T>(items: readonly T[]): T {
    return items[this.below(items.length)]!
  }
  /** False once the row is used up. */
  yes(outOf = 2): boolean {
    return this.below(outOf) === outOf - 1
  }
  maybe<T>(make: () => T): T | undefined {
    return this.yes() ? make() : undefined
  }
  list<T>(most: number, make: (index: number) => T): T[] {
    return Array.from({ length: this.below(most + 1) }, (_, index) => make(index))
  }
  some<T>(items: readonly T[]): T[] {
    return items.filter(() => this.yes(3))
  }
}

/** Rows to draw from; shrinking makes them shorter and their numbers smaller, and so the documents made from them. */
export const arbitraryDraws = (longest: number): fc.Arbitrary<Draws> =>
  fc
    .array(fc.nat(0xffff), { minLength: 1, maxLength: longest, size: 'max' })
    .map((numbers) => new Draws(numbers))

/** Ids `mine-line-000001`, `mine-step-000002` …: different for each maker, the same in each run. */
export function countedIds(maker: string): (kind: string) => string {
  let count = 0
  return (kind) => `${maker}-${kind}-${String((count += 1)).padStart(6, '0')}`
}
