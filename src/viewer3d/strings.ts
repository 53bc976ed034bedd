import type sentences from '../locales/en/viewer.json'

/** The sentences of the 3D view, as in src/locales/<language>/viewer.json. They come in from outside, so that it needs no i18n. */
export type ViewerStrings = Readonly<Record<keyof typeof sentences, string>>
