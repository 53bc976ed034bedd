import sharp, { type Metadata, type Sharp } from 'sharp'

/** More than any camera takes; a bomb of some KB can promise a thousand times more. */
export const MOST_PIXELS = 100_000_000

// libvips reads many formats (SVG, PDF, FITS …) that a site should never hand to a decoder.
sharp.block({ operation: ['VipsForeignLoad'] })
sharp.unblock({
  operation: ['VipsForeignLoadJpeg', 'VipsForeignLoadPng', 'VipsForeignLoadWebp', 'VipsForeignLoadHeif'],
})
sharp.cache(false)
sharp.concurrency(1)

/** Opens a picture with the site's limits, upright by its EXIF orientation. */
export const openPicture = (file: string): Sharp =>
  sharp(file, { limitInputPixels: MOST_PIXELS, failOn: 'error', sequentialRead: true }).autoOrient()

/** Reads the head of a picture alone; nothing is decoded, so that any promised size can be looked at. */
export const headOf = (file: string): Promise<Metadata> => sharp(file, { limitInputPixels: false }).metadata()
