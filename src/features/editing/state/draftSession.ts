import type { AlsoHere, Draft, DraftConflict, HereAnswer, SavedDraft } from '../../../../shared/api/drafts'
import type { FileEntry, FilesAnswer, UploadAnswer } from '../../../../shared/api/files'
import type { GuideEntry } from '../../../../shared/api/guides'
import type { GuideDocument } from '../../../../shared/guide/schema'
import { NoAnswer, RequestProblem } from '../../../lib/request'
import type { Change } from '../draftStore'
import { NO_HISTORY, redo, remember, undo, type History } from './history'
import type { KeptDrafts } from './keptDrafts'
import {
  answered,
  changed,
  isUnsent,
  looked,
  maySend,
  refused,
  sent,
  startSaving,
  takeUp,
  toKeep,
  unanswered,
  type KeptChanges,
  type Saving,
} from './saving'

/** All that the session needs of the world. */
export interface Outside {
  fetchDraft: () => Promise<Draft>
  saveDraft: (document: GuideDocument, version: number) => Promise<SavedDraft>
  saveWhileClosing: (document: GuideDocument, version: number) => boolean
  sayHere: (step: string | null) => Promise<HereAnswer>
  settleConflict: (id: string, keep: 'mine' | 'theirs') => Promise<unknown>
  sendFiles: (files: readonly File[], onProgress: (share: number) => void) => Promise<UploadAnswer>
  fetchFiles: (hashes: readonly string[]) => Promise<FilesAnswer>
  kept: KeptDrafts
  now: () => number
}

/** Why the last save was refused, by what a person can do about it. */
export type Refusal = 'sign in' | 'not allowed' | 'too large' | 'wrong' | 'full' | 'later'

/** What the state line says. */
export type SaveState =
  | { is: 'kept'; at: string | null }
  | { is: 'changed' }
  | { is: 'keeping' }
  | { is: 'no network' }
  | { is: 'refused'; why: Refusal; error: Error }

/** Files on their way: how many, and how far. */
export interface Sending {
  id: number
  names: string[]
  share: number
}

/** A file that was not taken, with the site's sentence, or the error that kept it from arriving. */
export interface RefusedFile {
  name: string
  why: string | Error
}

export interface DraftView {
  guide: GuideEntry
  document: GuideDocument
  version: number
  save: SaveState
  /** False where this browser does not let anything be kept: then a closed page may lose the last seconds. */
  keptHere: boolean
  /** Changes of an earlier page were found on this device and are being sent. */
  tookUp: boolean
  canUndo: boolean
  canRedo: boolean
  conflicts: readonly DraftConflict[]
  also: readonly AlsoHere[]
  files: ReadonlyMap<string, FileEntry>
  sending: readonly Sending[]
  refusedFiles: readonly RefusedFile[]
}

export type SessionView =
  { is: 'loading' } | { is: 'failed'; error: Error } | { is: 'open'; draft: DraftView }

const SAVE_AFTER_MS = 800
const SAVE_AT_THE_LATEST_MS = 5000
const KEEP_EVERY_MS = 500
const RETRY_FIRST_MS = 1000
const RETRY_LAST_MS = 30_000
const HERE_EVERY_MS = 10_000
const FILES_EVERY_MS = 1500

/** What a problem of the interface means for a person who saves. */
const REFUSALS: Record<string, Refusal> = {
  'not-signed-in': 'sign in',
  'not-allowed': 'not allowed',
  'not-found': 'not allowed',
  'too-large': 'too large',
  'bad-request': 'wrong',
  'no-space': 'full',
}

/** After these it helps to try again by itself; after the others a person must do something first. */
const TRY_AGAIN: ReadonlySet<Refusal> = new Set(['full', 'later', 'sign in'])

/**
 * One open draft: holds the document, remembers what was done, saves it, keeps on this device what the site does not have yet,
 * and takes in what others save. React only looks at it.
 */
export class DraftSession {
  private view: SessionView = { is: 'loading' }
  private readonly watchers = new Set<() => void>()
  private saving: Saving | null = null
  private history: History = NO_HISTORY
  private rest: Omit<DraftView, 'document' | 'version' | 'canUndo' | 'canRedo'> | null = null
  private step: string | null = null
  private timers: Partial<Record<'save' | 'keep' | 'here' | 'files', ReturnType<typeof setTimeout>>> = {}
  private firstUnsentAt: number | null = null
  private retries = 0
  private leftover: { changes: KeptChanges; drop: () => Promise<void> }[] = []
  private alive = false
  private openings = 0
  private nextSending = 0

  constructor(private readonly outside: Outside) {}

  readonly watch = (watcher: () => void): (() => void) => {
    this.watchers.add(watcher)
    return () => this.watchers.delete(watcher)
  }
  readonly look = (): SessionView => this.view

  /** Opens the draft, taking up what an earlier page kept. */
  async open(): Promise<void> {
    this.alive = true
    const opening = (this.openings += 1)
    this.outside.kept.hold()
    try {
      const [found, left] = await Promise.all([this.outside.fetchDraft(), this.leftBehind()])
      if (!this.alive || opening !== this.openings) return
      const [first, ...others] = left
      this.leftover = others
      this.saving = first === undefined ? startSaving(found) : takeUp(first.changes, found)
      const tookUp = isUnsent(this.saving)
      this.rest = {
        guide: found.guide,
        save: tookUp ? { is: 'changed' } : { is: 'kept', at: found.guide.updatedAt },
        keptHere: true,
        tookUp,
        conflicts: found.conflicts,
        also: [],
        files: new Map(found.files.map((file) => [file.sha256, file])),
        sending: [],
        refusedFiles: [],
      }
      if (first !== undefined) {
        if (tookUp) await this.keepNow()
        await first.drop()
      }
      this.show()
      if (tookUp) this.saveSoon(0)
      else void this.sendLeftover()
      this.sayHereSoon(0)
      this.askFilesSoon()
    } catch (error) {
      this.view = { is: 'failed', error: error instanceof Error ? error : new Error(String(error)) }
      this.tell()
    }
  }

  /** The page goes to other things: sends what is unsent, and stops. */
  close(): void {
    if (!this.alive) return
    if (this.saving !== null && maySend(this.saving)) this.saveNow()
    this.alive = false
    for (const timer of Object.values(this.timers)) clearTimeout(timer)
    this.timers = {}
    // The last save may still be under way; it ends by itself, and what is kept is forgotten only then.
    if ((this.saving?.sending ?? null) === null) this.outside.kept.letGo()
  }

  edit(change: Change, together?: string): void {
    const saving = this.must()
    const document = change(saving.document)
    if (document === saving.document) return
    this.history = remember(this.history, saving.document, document, this.outside.now(), together)
    this.put(document)
  }

  /** A change that is no deed of its own, such as the list of files behind a figure: it is saved, and undo passes it by. */
  editSilently(change: Change): void {
    this.put(change(this.must().document))
  }

  undo(): boolean {
    return this.travel(undo)
  }

  redo(): boolean {
    return this.travel(redo)
  }

  private travel(how: typeof undo): boolean {
    const went = how(this.history, this.must().document)
    if (went === undefined) return false
    this.history = went.history
    this.put(went.document)
    return true
  }

  private put(document: GuideDocument): void {
    const saving = this.must()
    if (document === saving.document) return
    this.saving = changed(saving, document)
    if (this.rest !== null && this.rest.save.is === 'kept')
      this.rest = { ...this.rest, save: { is: 'changed' } }
    this.show()
    this.keepSoon()
    this.firstUnsentAt ??= this.outside.now()
    if (this.rest?.save.is !== 'no network') {
      const latest = this.firstUnsentAt + SAVE_AT_THE_LATEST_MS - this.outside.now()
      this.saveSoon(Math.max(0, Math.min(SAVE_AFTER_MS, latest)))
    }
  }

  /** The step that is open, told to the others who are here. */
  goTo(step: string | null): void {
    if (this.step === step) return
    this.step = step
    if (this.saving !== null) this.sayHereSoon(300)
  }

  /** Sends at once what is unsent: before publishing, when the network is back, when the person asks for it. */
  saveNow(): void {
    clearTimeout(this.timers.save)
    void this.save()
  }

  /** Resolves when the site has everything, or rejects when it cannot be saved now. */
  async settled(): Promise<number> {
    for (let tries = 0; tries < 100; tries += 1) {
      const saving = this.must()
      if (!isUnsent(saving) && saving.sending === null && saving.lost === null) return saving.siteVersion
      if (saving.sending === null) await this.save()
      else await new Promise((resolve) => setTimeout(resolve, 100))
      const save = this.rest?.save
      if (save?.is === 'refused') throw save.error
      if (save?.is === 'no network') throw new NoAnswer('There was no answer from the site.')
    }
    throw new NoAnswer('There was no answer from the site.')
  }

  /** The page may be closed in the next moment. @returns true where something could be lost by it. */
  closing(): boolean {
    const saving = this.saving
    if (saving === null || !isUnsent(saving)) return false
    void this.keepNow()
    if (maySend(saving) && this.outside.saveWhileClosing(saving.document, saving.version)) {
      // If the page stays after all, the next look at the site tells what became of it.
      this.saving = unanswered(sent(saving))
      this.saveSoon(RETRY_FIRST_MS)
      return false
    }
    return this.rest?.keptHere === false
  }

  async settle(id: string, keep: 'mine' | 'theirs'): Promise<void> {
    await this.outside.settleConflict(id, keep)
    this.patch((rest) => ({ conflicts: rest.conflicts.filter((conflict) => conflict.id !== id) }))
    await this.lookAtSite()
  }

  /** Sends files and adds the stored ones to the document's assets. Each refused file is shown with its sentence. */
  async bringFiles(files: readonly File[]): Promise<FileEntry[]> {
    const id = (this.nextSending += 1)
    const names = files.map((file) => file.name)
    this.patch((rest) => ({ sending: [...rest.sending, { id, names, share: 0 }] }))
    try {
      const answer = await this.outside.sendFiles(files, (share) =>
        this.patch((rest) => ({
          sending: rest.sending.map((each) => (each.id === id ? { ...each, share } : each)),
        })),
      )
      this.takeFiles(answer.files)
      this.editSilently((document) => withAssets(document, answer.files))
      this.patch((rest) => ({
        refusedFiles: [
          ...rest.refusedFiles,
          ...answer.refused.map(({ name, sentence }) => ({ name, why: sentence })),
        ],
      }))
      return answer.files
    } catch (error) {
      if (!(error instanceof RequestProblem || error instanceof NoAnswer)) throw error
      this.patch((rest) => ({ refusedFiles: [...rest.refusedFiles, ...refusedOf(error, names)] }))
      return []
    } finally {
      this.patch((rest) => ({ sending: rest.sending.filter((each) => each.id !== id) }))
    }
  }

  forgetRefusedFiles(): void {
    this.patch(() => ({ refusedFiles: [] }))
  }

  // ---- saving

  private async save(): Promise<void> {
    delete this.timers.save
    const saving = this.saving
    if (saving === null || saving.sending !== null) return
    if (saving.lost !== null) {
      await this.lookAtSite()
      if (this.saving?.lost !== null) return
      this.saveSoon(0)
      return
    }
    if (!isUnsent(saving)) return
    this.saving = sent(saving)
    this.firstUnsentAt = null
    this.patch((rest) => (rest.save.is === 'no network' ? {} : { save: { is: 'keeping' } }))
    try {
      const answer = await this.outside.saveDraft(saving.document, saving.version)
      this.saving = answered(this.must(), answer)
      this.retries = 0
      this.patch((rest) => ({
        save: isUnsent(this.must()) ? { is: 'changed' } : { is: 'kept', at: answer.savedAt },
        tookUp: false,
        conflicts: joined(rest.conflicts, answer.conflicts),
      }))
      if (answer.merged) this.askFilesSoon()
      await this.keepNow()
      if (!isUnsent(this.must())) await this.sendLeftover()
      else if (this.alive) this.saveSoon(SAVE_AFTER_MS)
      else await this.save()
    } catch (error) {
      this.saveFailed(error)
    }
    if (!this.alive) this.outside.kept.letGo()
  }

  private saveFailed(error: unknown): void {
    const saving = this.must()
    void this.keepNow()
    if (error instanceof RequestProblem) {
      const why = REFUSALS[error.kind] ?? 'later'
      this.saving = refused(saving)
      this.patch(() => ({ save: { is: 'refused', why, error } }))
      if (TRY_AGAIN.has(why)) this.retryLater()
      return
    }
    // No answer, or one that nobody understands: the site may have it or not.
    this.saving = unanswered(saving)
    this.patch(() => ({ save: { is: 'no network' } }))
    this.retryLater()
  }

  private retryLater(): void {
    const wait = Math.min(RETRY_LAST_MS, RETRY_FIRST_MS * 2 ** this.retries)
    this.retries += 1
    this.saveSoon(wait)
  }

  private saveSoon(ms: number): void {
    if (!this.alive) return
    clearTimeout(this.timers.save)
    this.timers.save = setTimeout(() => void this.save(), ms)
  }

  /** What other closed pages of this person left: sent as they are, as late saves, so that the site combines them. */
  private async sendLeftover(): Promise<void> {
    for (let next = this.leftover[0]; next !== undefined; next = this.leftover[0]) {
      try {
        await this.outside.saveDraft(next.changes.document, next.changes.version)
      } catch (error) {
        if (!(error instanceof RequestProblem || error instanceof NoAnswer)) throw error
        return // It stays kept; the next page tries again.
      }
      this.leftover = this.leftover.slice(1)
      await next.drop()
      await this.lookAtSite()
    }
  }

  // ---- keeping on this device

  private async leftBehind(): Promise<{ changes: KeptChanges; drop: () => Promise<void> }[]> {
    try {
      return await this.outside.kept.left()
    } catch (error) {
      if (!(error instanceof DOMException)) throw error
      return [] // This browser keeps nothing; the first attempt to keep says so on the page.
    }
  }

  private keepSoon(): void {
    this.timers.keep ??= setTimeout(() => void this.keepNow(), KEEP_EVERY_MS)
  }

  private async keepNow(): Promise<void> {
    clearTimeout(this.timers.keep)
    delete this.timers.keep
    const saving = this.saving
    if (saving === null) return
    try {
      if (isUnsent(saving) || saving.lost !== null) {
        await this.outside.kept.keep(toKeep(saving, this.outside.now()))
      } else await this.outside.kept.forget()
      if (this.rest?.keptHere === false) this.patch(() => ({ keptHere: true }))
    } catch (error) {
      if (!(error instanceof DOMException)) throw error
      this.patch(() => ({ keptHere: false }))
    }
  }

  // ---- what others do

  /** Takes in what the site has now. */
  async lookAtSite(): Promise<void> {
    try {
      const found = await this.outside.fetchDraft()
      this.saving = looked(this.must(), found)
      const unsent = isUnsent(this.saving)
      this.takeFiles(found.files)
      this.patch((rest) => ({
        guide: found.guide,
        conflicts: found.conflicts,
        save: unsent ? rest.save : { is: 'kept', at: found.guide.updatedAt },
      }))
      await this.keepNow()
      if (unsent && maySend(this.saving) && this.timers.save === undefined) this.saveSoon(0)
    } catch (error) {
      this.saveFailedToLook(error)
    }
  }

  private saveFailedToLook(error: unknown): void {
    if (this.must().lost !== null || isUnsent(this.must())) this.saveFailed(error)
    // With nothing unsent the next look, ten seconds on, will do.
  }

  private sayHereSoon(ms: number): void {
    if (!this.alive) return
    clearTimeout(this.timers.here)
    this.timers.here = setTimeout(() => void this.sayHere(), ms)
  }

  private async sayHere(): Promise<void> {
    if (document.visibilityState === 'visible') {
      try {
        const { version, also } = await this.outside.sayHere(this.step)
        this.patch(() => ({ also }))
        const saving = this.must()
        if (version > saving.siteVersion && saving.sending === null) {
          if (maySend(saving)) this.saveNow()
          else await this.lookAtSite()
        }
      } catch (error) {
        if (!(error instanceof RequestProblem || error instanceof NoAnswer)) throw error
        this.patch(() => ({ also: [] }))
      }
    }
    this.sayHereSoon(HERE_EVERY_MS)
  }

  // ---- files

  private takeFiles(files: readonly FileEntry[]): void {
    this.patch((rest) => ({
      files: new Map([...rest.files, ...files.map((file) => [file.sha256, file] as const)]),
    }))
    this.askFilesSoon()
  }

  private askFilesSoon(): void {
    if (!this.alive || this.timers.files !== undefined || this.waitedFor().length === 0) return
    this.timers.files = setTimeout(() => void this.askFiles(), FILES_EVERY_MS)
  }

  /** Files that are still worked on, or that came in with somebody else's change. */
  private waitedFor(): string[] {
    const known = this.rest?.files ?? new Map<string, FileEntry>()
    const working = [...known.values()].filter((file) => file.state === 'working').map((file) => file.sha256)
    const unknown = (this.saving?.document.assets ?? [])
      .map((asset) => asset.sha256)
      .filter((hash) => !known.has(hash) && !this.unknownFiles.has(hash))
    return [...working, ...unknown]
  }

  /** Asked for and not there: not asked for again. */
  private readonly unknownFiles = new Set<string>()

  private async askFiles(): Promise<void> {
    delete this.timers.files
    const asked = this.waitedFor()
    try {
      const { files } = await this.outside.fetchFiles(asked)
      for (const hash of asked) if (!files.some((file) => file.sha256 === hash)) this.unknownFiles.add(hash)
      if (files.length > 0) this.takeFiles(files)
    } catch (error) {
      if (!(error instanceof RequestProblem || error instanceof NoAnswer)) throw error
    }
    this.askFilesSoon()
  }

  // ---- the view

  private must(): Saving {
    if (this.saving === null) throw new Error('The draft is not open yet.')
    return this.saving
  }

  private patch(
    change: (rest: NonNullable<typeof this.rest>) => Partial<NonNullable<typeof this.rest>>,
  ): void {
    if (this.rest === null) return
    this.rest = { ...this.rest, ...change(this.rest) }
    this.show()
  }

  private show(): void {
    if (this.rest === null || this.saving === null) return
    this.view = {
      is: 'open',
      draft: {
        ...this.rest,
        document: this.saving.document,
        version: this.saving.siteVersion,
        canUndo: this.history.past.length > 0,
        canRedo: this.history.future.length > 0,
      },
    }
    this.tell()
  }

  private tell(): void {
    for (const watcher of this.watchers) watcher()
  }
}

/** Every conflict once; what the newer answer says of one counts. */
const joined = (old: readonly DraftConflict[], fresh: readonly DraftConflict[]): DraftConflict[] => [
  ...old.filter((conflict) => !fresh.some((other) => other.id === conflict.id)),
  ...fresh,
]

/** Where none was taken, the problem names each file with its sentence; else all of them failed alike. */
function refusedOf(error: Error, names: readonly string[]): RefusedFile[] {
  const each = error instanceof RequestProblem ? (error.details.errors ?? []) : []
  const named = each.flatMap(({ path, message }) =>
    path[0] === 'files' && path.length === 3 ? [{ name: String(path[2]), why: message }] : [],
  )
  return named.length > 0 ? named : names.map((name) => ({ name, why: error }))
}

/** The document with these files among its assets. */
function withAssets(document: GuideDocument, files: readonly FileEntry[]): GuideDocument {
  const known = new Set(document.assets.map((asset) => asset.sha256))
  const fresh = files.filter((file) => !known.has(file.sha256))
  if (fresh.length === 0) return document
  const assets = fresh.map(({ sha256, mediaType, bytes, name }) => ({ sha256, mediaType, bytes, name }))
  return { ...document, assets: [...document.assets, ...assets] }
}
