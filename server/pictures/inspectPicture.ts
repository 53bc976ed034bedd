import { headOf, MOST_PIXELS, openPicture } from './openPicture'
import type { PictureInspected } from './types'

const UNREADABLE: PictureInspected = { ok: false, why: 'unreadable', megapixels: 0 }

/** Looks at the head of a picture before anything of it is decoded. */
export async function inspectPicture(file: string): Promise<PictureInspected> {
  const head = await orUndefined(headOf(file))
  if (head === undefined) return UNREADABLE
  const { width, height } = head.autoOrient
  const pixels = width * height
  if (pixels > MOST_PIXELS) return { ok: false, why: 'too-many-pixels', megapixels: Math.ceil(pixels / 1e6) }
  // Whether a HEIF can be decoded hangs on the codec inside, which only decoding tells.
  if (head.format === 'heif') {
    const small = await orUndefined(openPicture(file).resize(16).raw().toBuffer())
    if (small === undefined) return UNREADABLE
  }
  return { ok: true, width, height }
}

/** What libvips cannot read is an answer here, not a fault: it does not say which of the two an error is. */
async function orUndefined<Value>(reading: Promise<Value>): Promise<Value | undefined> {
  try {
    return await reading
  } catch (error) {
    if (error instanceof Error) return undefined
    throw error
  }
}
