import type { LineDrawing } from '../types'
import { depthBufferOf } from './depthBuffer'
import { joinStrokes } from './joinStrokes'
import { depthInside, placeBalloons, pointOn } from './regions'
import { FROM_THE_FRONT, project, type PlacedMesh, type View } from './view'
import { follow, visibleLines, type Stroke } from './visibleLines'

type Point = readonly [number, number, number]

export interface DrawOptions {
  view?: Partial<View>
  /** Points that callouts name: a part's name (or several that count as one), or a point of space. */
  anchors?: Readonly<Record<string, string | readonly string[] | Point>>
  /** Centre lines in space, drawn in the drawing office's chain weight where nothing hides them. */
  axes?: readonly (readonly [Point, Point])[]
  /** Parts whose lines are thin: rope, mesh, a neighbour that only shows where the rest belongs. */
  thin?: readonly string[]
  /** Lines shorter than this many pixels are left out. Default 1.5; more for scans, whose surface is all small bends. */
  speck?: number
}

const SPECK = 1.5

/**
 * A line drawing of one solid, or of several at their places: outlines, sharp edges and borders with hidden lines taken away.
 * An anchor whose part cannot be seen is left out. Cost O(facets + samples + length of lines); 10,000 facets take about 0.1 s.
 */
export function drawView(parts: readonly PlacedMesh[], options: DrawOptions = {}): LineDrawing {
  const projection = project(parts, { ...FROM_THE_FRONT, ...options.view })
  const buffer = depthBufferOf(projection)
  const thin = new Set(options.thin)
  const strokes = {
    outline: [] as Stroke[],
    part: [] as Stroke[],
    thin: [] as Stroke[],
    chain: [] as Stroke[],
  }
  projection.parts.forEach((part, index) => {
    const isThin = thin.has(parts[index]!.name)
    for (const stroke of visibleLines(part, buffer))
      strokes[isThin ? 'thin' : stroke.outline ? 'outline' : 'part'].push(stroke)
  })
  for (const [from, to] of options.axes ?? [])
    follow([...projection.place(from), ...projection.place(to)], 0, 3, buffer, strokes.chain)
  const anchors: Record<string, { x: number; y: number }> = {}
  const asked = Object.keys(options.anchors ?? {}).length > 0
  const inside = asked ? depthInside(buffer) : new Float32Array()
  for (const [name, anchor] of Object.entries(options.anchors ?? {})) {
    const point = isPoint(anchor)
      ? onSheet(projection.place(anchor))
      : pointOn(buffer, inside, numbersOf(parts, typeof anchor === 'string' ? [anchor] : anchor))
    if (point !== undefined) anchors[name] = point
  }
  const { width, height } = projection
  const speck = options.speck ?? SPECK
  const inHundredths = (points: Record<string, { x: number; y: number }>) =>
    Object.fromEntries(
      Object.entries(points).map(([name, { x, y }]) => [
        name,
        { x: Math.round((x / width) * 10000), y: Math.round((y / height) * 10000) },
      ]),
    )
  return {
    width,
    height,
    paths: {
      outline: joinStrokes(strokes.outline, speck),
      part: joinStrokes(strokes.part, speck),
      thin: joinStrokes(strokes.thin, speck),
      chain: joinStrokes(strokes.chain, speck),
    },
    anchors: inHundredths(anchors),
    balloons: inHundredths(placeBalloons(buffer, inside, anchors)),
  }
}

function isPoint(anchor: string | readonly string[] | Point): anchor is Point {
  return typeof anchor !== 'string' && typeof anchor[0] === 'number'
}

function onSheet([x, y]: readonly [number, number, number]): { x: number; y: number } {
  return { x, y }
}

function numbersOf(parts: readonly PlacedMesh[], names: readonly string[]): Set<number> {
  return new Set(parts.flatMap(({ name }, index) => (names.includes(name) ? [index] : [])))
}
