import type { LineDrawing } from '../types'

/** Widths in pixels of the screen whatever the size at which a drawing is shown, and the dashes of a centre line. */
const WEIGHTS = {
  outline: { width: 1.7, dash: '' },
  part: { width: 1.2, dash: '' },
  thin: { width: 0.8, dash: '' },
  chain: { width: 0.8, dash: '12 3 2 3' },
} as const satisfies Record<keyof LineDrawing['paths'], { width: number; dash: string }>

/**
 * The drawing as an SVG that stands alone. Lines have the colour of the text about them: put it into the page, or use it as a mask over the
 * ink, to have it follow the theme. Within `<img>` it is black.
 */
export function svgOf(drawing: LineDrawing): string {
  const paths = (Object.keys(WEIGHTS) as (keyof typeof WEIGHTS)[])
    .filter((weight) => drawing.paths[weight] !== '')
    .map((weight) => {
      const { width, dash } = WEIGHTS[weight]
      const dashes = dash === '' ? '' : ` stroke-dasharray="${dash}"`
      return `<path vector-effect="non-scaling-stroke" stroke-width="${width}"${dashes} d="${drawing.paths[weight]}"/>`
    })
  return (
    `<svg xmlns="http://www.w3.org/2000/svg" viewBox="0 0 ${drawing.width} ${drawing.height}" width="${drawing.width}" height="${drawing.height}" ` +
    `fill="none" stroke="currentColor" stroke-linejoin="round" stroke-linecap="round">${paths.join('')}</svg>`
  )
}
