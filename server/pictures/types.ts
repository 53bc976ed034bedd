/** What an upload asks of a picture before it is stored: its size as seen, or why it cannot be taken. */
export type PictureInspected =
  | { ok: true; width: number; height: number }
  | { ok: false; why: 'unreadable' | 'too-many-pixels'; megapixels: number }

export interface PictureRequest {
  /** The picture as stored. */
  file: string
  /** A folder that exists. */
  outDir: string
  format: 'webp' | 'avif'
}

export interface MadePicture {
  name: string
  file: string
  mediaType: string
  bytes: number
  width: number
  height: number
}

/** A picture that turns out to be damaged is an ordinary outcome. Trouble with the disk throws, and may be tried again. */
export type PictureMade = { ok: true; width: number; height: number; made: MadePicture[] } | { ok: false }
