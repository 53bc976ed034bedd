import path from 'node:path'
import { headOf, openPicture } from './openPicture'
import type { MadePicture, PictureMade, PictureRequest } from './types'

const WIDTHS = { webp: [480, 960, 1600], avif: [960, 1600] } as const
const WEBP_QUALITY = 78
const AVIF_QUALITY = 55
/** At effort 4 an AVIF takes ten times as long and is hardly smaller. */
const AVIF_EFFORT = 1

/**
 * Makes a picture's renditions: upright, in sRGB, without any metadata (position, serial numbers, names), never enlarged. The
 * largest one has the picture's own width where that lies below the next step. Writing twice gives the same bytes.
 */
export async function makePicture({ file, outDir, format }: PictureRequest): Promise<PictureMade> {
  try {
    const { width, height } = (await headOf(file)).autoOrient
    const made: MadePicture[] = []
    for (const step of stepsUpTo(width, WIDTHS[format])) {
      made.push(await write(file, outDir, format, step, Math.min(step, width)))
    }
    return { ok: true, width, height, made }
  } catch (error) {
    if (!isAboutPicture(error)) throw error
    return { ok: false }
  }
}

/** The steps below the width and the first one that reaches it. */
const stepsUpTo = (width: number, steps: readonly number[]): number[] =>
  steps.filter((_, at) => at === 0 || steps[at - 1]! < width)

async function write(
  file: string,
  outDir: string,
  format: 'webp' | 'avif',
  step: number,
  width: number,
): Promise<MadePicture> {
  const name = `${format}-${step}`
  const out = path.join(outDir, name)
  const sized = openPicture(file).resize({ width, withoutEnlargement: true })
  const encoded =
    format === 'webp'
      ? sized.webp({ quality: WEBP_QUALITY })
      : sized.avif({ quality: AVIF_QUALITY, effort: AVIF_EFFORT })
  const info = await encoded.toFile(out)
  return {
    name,
    file: out,
    mediaType: `image/${format}`,
    bytes: info.size,
    width: info.width,
    height: info.height,
  }
}

/** libvips gives errors without a code; those of the disk say so in their text. */
const isAboutPicture = (error: unknown): boolean =>
  error instanceof Error && !/no space|write error|unable to open|i\/o error/i.test(error.message)
