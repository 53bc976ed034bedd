import { describe, expect, test } from 'vitest'
import { box, icosphere, prism } from '../../../fixtures/reference/solids'
import type { Mesh } from '../../../shared/lib/geometry/mesh'
import { drawView } from './drawView'
import { pngOf } from './pngOf'
import { svgOf } from './svgOf'

const view = { azimuth: -57, elevation: 26, width: 400, mostHeight: 400, margin: 20 }

/** The lines of path data as points, for counting and measuring. */
function linesOf(path: string): [number, number][][] {
  return path
    .split('M')
    .filter((piece) => piece !== '')
    .map((piece) => {
      const numbers = [...piece.matchAll(/-?(?:\d+\.?\d*|\.\d+)/g)].map(([text]) => Number(text))
      let [x, y] = [numbers[0]!, numbers[1]!]
      const line: [number, number][] = [[x, y]]
      for (let at = 2; at < numbers.length; at += 2) line.push([(x += numbers[at]!), (y += numbers[at + 1]!)])
      if (piece.endsWith('z')) line.push(line[0]!)
      return line
    })
}

function lengthOf(path: string): number {
  return linesOf(path).reduce(
    (total, line) =>
      total +
      line.slice(1).reduce((sum, [x, y], at) => sum + Math.hypot(x - line[at]![0], y - line[at]![1]), 0),
    0,
  )
}

const allOf = ({ paths }: ReturnType<typeof drawView>): string => paths.outline + paths.part

function shifted({ positions, faces }: Mesh, dx: number, dy: number, dz: number): Mesh {
  return { faces, positions: positions.map((value, at) => value + [dx, dy, dz][at % 3]!) }
}

describe('hidden lines', () => {
  test('a cube shows the nine edges of its three visible faces, at their projected lengths', () => {
    const drawing = drawView([{ name: 'cube', mesh: box(10, 10, 10) }], { view })
    const a = (-57 * Math.PI) / 180
    const e = (26 * Math.PI) / 180
    // Lengths of the unit edges along x, y and z on the sheet, three of each, scaled to the sheet.
    const [x, y] = [
      Math.hypot(Math.sin(a), Math.sin(e) * Math.cos(a)),
      Math.hypot(Math.cos(a), Math.sin(e) * Math.sin(a)),
    ]
    const scale = (drawing.width - 40) / (10 * (Math.abs(Math.sin(a)) + Math.cos(a)))
    const height = drawing.height
    const fit = Math.min(
      scale,
      (height - 40) / (10 * (Math.sin(e) * (Math.abs(Math.sin(a)) + Math.cos(a)) + Math.cos(e))),
    )
    const wanted = 3 * 10 * fit * (x + y + Math.cos(e))
    // Tolerance: the sheet is rounded up to whole pixels, points to tenths.
    expect(Math.abs(lengthOf(allOf(drawing)) / wanted - 1)).toBeLessThan(0.01)
  })

  test('a small cube behind a large one leaves no line', () => {
    const alone = drawView([{ name: 'large', mesh: box(10, 10, 10) }], { view })
    const both = drawView(
      [
        { name: 'large', mesh: box(10, 10, 10) },
        { name: 'small', mesh: shifted(box(2, 2, 2), 4, 4, 4) },
      ],
      { view, anchors: { small: 'small', large: 'large' } },
    )
    expect(both.paths).toEqual(alone.paths)
    expect(both.anchors['small']).toBeUndefined()
    expect(both.anchors['large']).toBeDefined()
  })

  test('a ball is its outline and nothing within', () => {
    const drawing = drawView([{ name: 'ball', mesh: icosphere(10, 4) }], { view })
    const around = Math.PI * (drawing.width - 2 * view.margin)
    expect(lengthOf(allOf(drawing)) / around).toBeGreaterThan(0.95)
    expect(lengthOf(allOf(drawing)) / around).toBeLessThan(1.12)
  })

  test('a cylinder shows its upper rim, half of its lower one and two sides', () => {
    const drawing = drawView([{ name: 'rod', mesh: prism(64, 5, 20) }], { view })
    const scale =
      (drawing.height - 40) / (20 * Math.cos((26 * Math.PI) / 180) + 10 * Math.sin((26 * Math.PI) / 180))
    const [long, short] = [5 * scale, 5 * scale * Math.sin((26 * Math.PI) / 180)]
    // Ramanujan's first approximation of an ellipse's perimeter.
    const rim = Math.PI * (3 * (long + short) - Math.sqrt((3 * long + short) * (long + 3 * short)))
    const wanted = 1.5 * rim + 2 * 20 * scale * Math.cos((26 * Math.PI) / 180)
    expect(Math.abs(lengthOf(allOf(drawing)) / wanted - 1)).toBeLessThan(0.04)
  })

  test('a solid turned inside out and one that is open are drawn too', () => {
    const { positions, faces } = box(10, 10, 10)
    const whole = lengthOf(allOf(drawView([{ name: 'a', mesh: { positions, faces } }], { view })))
    const inside = { positions, faces: faces.map((_, at) => faces[at - (at % 3) + ((3 - (at % 3)) % 3)]!) }
    expect(lengthOf(allOf(drawView([{ name: 'a', mesh: inside }], { view }))) / whole).toBeCloseTo(1, 1)
    expect(
      allOf(drawView([{ name: 'a', mesh: { positions, faces: faces.slice(0, 18) } }], { view })),
    ).not.toBe('')
  })

  test('a mesh without facets is an empty sheet', () => {
    const nothing = { positions: new Float32Array(), faces: new Uint32Array() }
    expect(drawView([{ name: 'a', mesh: nothing }], { view }).paths.outline).toBe('')
  })
})

describe('anchors and balloons', () => {
  const parts = [
    { name: 'left', mesh: box(10, 10, 10) },
    { name: 'right', mesh: shifted(box(10, 10, 10), 40, 0, 0) },
  ]
  const anchors = { left: 'left', right: 'right', corner: [40, 0, 10], pair: ['left', 'right'] } as const
  const drawing = drawView(parts, { view: { ...view, margin: 44 }, anchors })

  test('are integers in hundredths of a per cent, within the picture', () => {
    for (const { x, y } of [...Object.values(drawing.anchors), ...Object.values(drawing.balloons)]) {
      expect(Number.isInteger(x) && Number.isInteger(y)).toBe(true)
      expect(Math.min(x, y)).toBeGreaterThanOrEqual(0)
      expect(Math.max(x, y)).toBeLessThanOrEqual(10_000)
    }
  })

  test('lie on their parts; a point of space lies where it is projected', () => {
    expect(drawing.anchors['left']!.x).toBeLessThan(4500)
    expect(drawing.anchors['right']!.x).toBeGreaterThan(5500)
    const numbers = linesOf(allOf(drawing)).flat()
    const corner = drawing.anchors['corner']!
    const [x, y] = [(corner.x / 10_000) * drawing.width, (corner.y / 10_000) * drawing.height]
    expect(Math.min(...numbers.map(([px, py]) => Math.hypot(px - x, py - y)))).toBeLessThan(0.3)
  })

  test('balloons keep apart from each other and off the lines', () => {
    const places = Object.values(drawing.balloons).map(({ x, y }) => [
      (x / 10_000) * drawing.width,
      (y / 10_000) * drawing.height,
    ])
    places.forEach(([ax, ay], at) => {
      for (const [bx, by] of places.slice(at + 1))
        expect(Math.hypot(ax! - bx!, ay! - by!)).toBeGreaterThan(27)
      for (const [px, py] of linesOf(allOf(drawing)).flat())
        expect(Math.hypot(ax! - px, ay! - py)).toBeGreaterThan(10)
    })
  })
})

describe('the files', () => {
  const drawing = drawView([{ name: 'rod', mesh: prism(64, 5, 20) }], {
    view,
    axes: [
      [
        [0, 0, -6],
        [0, 0, 26],
      ],
    ],
  })

  test('the SVG has a path for each weight, in the colour of the text, and nothing that could run', () => {
    const svg = svgOf(drawing)
    expect(svg.match(/<path /g)).toHaveLength(3)
    expect(svg).toContain('stroke="currentColor"')
    expect(svg).toContain('stroke-dasharray')
    expect(svg).not.toMatch(/script|href|style|NaN|e-\d/)
    expect(svg.length).toBeLessThan(3000)
  })

  test('the PNG has the size that was asked for, paper at its corner and ink somewhere', async () => {
    const png = await pngOf(drawing, 600, 315)
    const { default: sharp } = await import('sharp')
    const { data, info } = await sharp(png).removeAlpha().raw().toBuffer({ resolveWithObject: true })
    expect([info.width, info.height]).toEqual([600, 315])
    expect(Math.abs(data[0]! - 251)).toBeLessThan(4)
    expect(data.reduce((least, value) => Math.min(least, value), 255)).toBeLessThan(60)
  })

  test('are the same bytes each time', () => {
    const again = drawView([{ name: 'rod', mesh: prism(64, 5, 20) }], {
      view,
      axes: [
        [
          [0, 0, -6],
          [0, 0, 26],
        ],
      ],
    })
    expect(svgOf(again)).toBe(svgOf(drawing))
  })
})
