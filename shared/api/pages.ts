import type { GuideDocument, MachineKind } from '../guide/schema'
import type { FileEntry } from './files'
import type { RevisionEntry } from './revisions'

/** One guide in the library's catalogue, as its latest revision has it. */
export interface LibraryEntry {
  slug: string
  title: string
  summary: string
  byline: string
  lang: string
  machine: MachineKind
  label: string
  publishedAt: string
  minutes: number
  steps: number
  lines: number
  skills: string[]
  /** The first claim with evidence, or else the first claim. */
  claim: GuideDocument['claims'][number] | null
  picture: { sha256: string; rendition: string; width: number; height: number; alt: string } | null
}

/** What a reader asked of the library, from its address. */
export interface LibraryQuestion {
  q: string
  machine: string
  language: string
  /** A skill and a tool by the name that guides give them. */
  skill: string
  tool: string
  sort: 'date' | 'title'
  page: number
}

export interface LibraryData {
  question: LibraryQuestion
  entries: LibraryEntry[]
  total: number
  pageSize: number
  machines: { value: MachineKind; count: number }[]
  languages: { value: string; count: number }[]
  skills: { value: string; count: number }[]
  tools: { value: string; count: number }[]
}

/** A guide at one of its revisions. */
export interface GuideData {
  slug: string
  byline: string
  document: GuideDocument
  revision: RevisionEntry
  /** Newest first. */
  revisions: RevisionEntry[]
  files: FileEntry[]
  /** The address names the revision, so that it never changes. */
  pinned: boolean
}

export type PageData =
  | { page: 'library'; library: LibraryData }
  | { page: 'front' | 'steps' | 'parts' | 'models' | 'revisions'; guide: GuideData }
  | { page: 'step'; guide: GuideData; step: number }
  | { page: 'missing' }

export interface PageRequest {
  data: PageData
  /** Language of the interface. */
  language: string
  /** The site's address without a slash at its end, and the path of this page without its query. */
  origin: string
  path: string
  style: string
  /** Address of the small script. */
  script: string
  /** Address of the style sheet with the typefaces, which the script asks for when the text stands. */
  fonts: string
  demo: boolean
}

/** Renders a whole HTML document. */
export type RenderPage = (request: PageRequest) => string
