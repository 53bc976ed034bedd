import sharp from 'sharp'
import type { LineDrawing } from '../types'

/** Paper and ink of the light theme (src/styles/tokens.css): a picture on somebody else's page cannot follow a theme. */
const PAPER = [251, 250, 245]
const INK = [30, 35, 32]
/** Share of the picture that stays free on each side. */
const BORDER = 0.08

/**
 * The drawing as a PNG of exactly this size, ink on paper, for pages that show a preview of a link.
 * The lines are rasterised here and not by the SVG loader of the picture library: that one stays closed for the whole process,
 * because what people upload must never reach it.
 */
export async function pngOf(drawing: LineDrawing, width = 1200, height = 630): Promise<Buffer> {
  const scale = Math.min(
    (width * (1 - 2 * BORDER)) / drawing.width,
    (height * (1 - 2 * BORDER)) / drawing.height,
  )
  const left = (width - drawing.width * scale) / 2
  const top = (height - drawing.height * scale) / 2
  const cover = new Float32Array(width * height)
  const weights = { outline: 2.6, part: 1.8, thin: 1.2, chain: 1.2 } as const
  for (const weight of ['outline', 'part', 'thin', 'chain'] as const) {
    for (const line of linesOf(drawing.paths[weight])) {
      for (let index = 1; index < line.length; index++) {
        const [ax, ay] = line[index - 1]!
        const [bx, by] = line[index]!
        ink(cover, width, height, weights[weight], [
          left + ax * scale,
          top + ay * scale,
          left + bx * scale,
          top + by * scale,
        ])
      }
    }
  }
  const pixels = Buffer.alloc(width * height * 3)
  for (let index = 0; index < cover.length; index++) {
    for (let channel = 0; channel < 3; channel++) {
      const paper = PAPER[channel]!
      pixels[index * 3 + channel] = Math.round(paper + (INK[channel]! - paper) * cover[index]!)
    }
  }
  return sharp(pixels, { raw: { width, height, channels: 3 } })
    .png({ palette: true, colours: 32, compressionLevel: 9 })
    .toBuffer()
}

/** Covers a pixel by how far its middle lies within the line; where lines meet, the darker counts. */
function ink(
  cover: Float32Array,
  width: number,
  height: number,
  weight: number,
  [ax, ay, bx, by]: [number, number, number, number],
): void {
  const reach = weight / 2 + 1
  const dx = bx - ax
  const dy = by - ay
  const squared = dx * dx + dy * dy || 1
  const fromX = Math.max(0, Math.floor(Math.min(ax, bx) - reach))
  const toX = Math.min(width - 1, Math.ceil(Math.max(ax, bx) + reach))
  const fromY = Math.max(0, Math.floor(Math.min(ay, by) - reach))
  const toY = Math.min(height - 1, Math.ceil(Math.max(ay, by) + reach))
  for (let y = fromY; y <= toY; y++) {
    for (let x = fromX; x <= toX; x++) {
      const px = x + 0.5 - ax
      const py = y + 0.5 - ay
      const t = Math.min(1, Math.max(0, (px * dx + py * dy) / squared))
      const covered = weight / 2 + 0.5 - Math.hypot(px - t * dx, py - t * dy)
      const index = y * width + x
      if (covered > cover[index]!) cover[index] = Math.min(1, covered)
    }
  }
}

/** The points of path data as `joinStrokes` writes it: "M x y l dx dy … z". */
function linesOf(path: string): [number, number][][] {
  return path
    .split('M')
    .filter((piece) => piece !== '')
    .map((piece) => {
      const numbers = [...piece.matchAll(/-?(?:\d+\.?\d*|\.\d+)/g)].map(([text]) => Number(text))
      let x = numbers[0]!
      let y = numbers[1]!
      const line: [number, number][] = [[x, y]]
      for (let index = 2; index + 1 < numbers.length; index += 2) {
        x += numbers[index]!
        y += numbers[index + 1]!
        line.push([x, y])
      }
      if (piece.endsWith('z')) line.push(line[0]!)
      return line
    })
}
