import type { Mesh } from '../../shared/lib/geometry/mesh'
import { drawView } from './drawing/drawView'
import { svgOf } from './drawing/svgOf'
import type { LineDrawing } from './types'

/** A still of more bytes than this is drawn again without its shortest lines. */
const MOST_BYTES = 40_000
const SPECKS = [1.5, 4, 9, 20]

/** The picture of one model in lines, of a size that a page can carry: scans lose their small bends before they grow larger. */
export function drawStill(mesh: Mesh): { drawing: LineDrawing; svg: string } {
  let still: { drawing: LineDrawing; svg: string } | undefined
  for (const speck of SPECKS) {
    const drawing = drawView([{ name: 'model', mesh }], { speck })
    still = { drawing, svg: svgOf(drawing) }
    if (still.svg.length <= MOST_BYTES) break
  }
  return still!
}
