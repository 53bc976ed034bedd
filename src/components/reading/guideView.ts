import { createContext, useContext } from 'react'
import type { FileEntry } from '../../../shared/api/files'
import { numbering, type Numbering } from '../../../shared/guide/numbering'
import { resolve } from '../../../shared/guide/resolve'
import type { Choices } from '../../../shared/guide/holds'
import type { GuideDocument } from '../../../shared/guide/schema'
import { directionOf } from '../../../shared/lib/language/direction'

/** What every part of a guide's text is drawn from. */
export interface GuideView {
  /** The guide as written, with all options. */
  whole: GuideDocument
  /** The one guide under the choices made; numbers are of this one. */
  doc: GuideDocument
  numbers: Numbering
  files: ReadonlyMap<string, FileEntry>
  /** Address of the guide at this revision: links to steps and lines begin with it. */
  base: string
  /** For the names of models to download. */
  label: string
}

export function viewOf(
  whole: GuideDocument,
  files: readonly FileEntry[],
  base: string,
  label: string,
  choices: Choices = {},
): GuideView {
  const doc = resolve(whole, choices)
  const known = new Map(files.map((file) => [file.sha256, file]))
  return { whole, doc, numbers: numbering(doc), files: known, base, label }
}

export const GuideContext = createContext<GuideView | null>(null)

/** @throws outside of a guide: a programmer's error. */
export function useGuide(): GuideView {
  const view = useContext(GuideContext)
  if (view === null) throw new Error('useGuide is used outside of a guide.')
  return view
}

/** `lang` and `dir` for the guide's own words where the interface is in another language; nothing where it is the same. */
export function ownLanguage(guide: string, page: string): { lang?: string; dir?: 'ltr' | 'rtl' } {
  return guide === page ? {} : { lang: guide, dir: directionOf(guide) }
}
