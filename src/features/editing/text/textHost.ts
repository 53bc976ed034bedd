import type { Condition, RichText } from '../../../../shared/guide/schema'
import type { Id } from '../../../../shared/lib/ids/id'
import { wordsOf } from '../../../../shared/guide/plainText'
import { stepsOf } from '../../../../shared/guide/stepsOf'
import type { DraftAtHand } from '../draftStore'
import type { Pick } from './pickable'

/** What the editor asks of the component round it, as it is after its latest rendering. */
export interface HostActs {
  choose: (pick: Pick, range: { from: number; to: number }) => void
  openLink: (anchor: Element) => void
  changeQuantity: (pos: number, anchor: Element) => void
}

/** What the editor, which lives longer than a rendering, asks of the draft as it is now. */
export class TextHost {
  private own: RichText
  private latestActs: HostActs | null = null

  constructor(
    private draft: DraftAtHand,
    readonly stepId: Id,
    private readonly sayOnlyWith: (names: string) => string,
  ) {
    this.own = this.body
  }

  /** The step's text as the draft has it now. */
  get body(): RichText {
    return stepsOf(this.draft.document).find(({ id }) => id === this.stepId)?.body ?? NOTHING
  }

  /** Remembers what the editor shows, so that it is not taken for something from outside. */
  wrote(body: RichText): void {
    this.own = body
  }

  isOwn(body: RichText): boolean {
    return body === this.own
  }

  onlyWith(when: Condition): string {
    const names = when.flatMap(({ line, is }) => {
      const options = this.draft.document.lines.find(({ id }) => id === line)?.options ?? []
      return options.filter(({ id }) => is.includes(id)).map(({ part }) => part.name)
    })
    return this.sayOnlyWith(names.join(', '))
  }

  take(draft: DraftAtHand, acts: HostActs): void {
    this.draft = draft
    this.latestActs = acts
  }

  /** Null before the first rendering is done. */
  get acts(): HostActs | null {
    return this.latestActs
  }

  get now(): DraftAtHand {
    return this.draft
  }

  has(target: 'line' | 'figure' | 'step', id: Id): boolean {
    const { document } = this.draft
    const list = { line: document.lines, figure: document.figures, step: stepsOf(document) }[target]
    return list.some((node) => node.id === id)
  }

  /** What a reference says in plain text. */
  word(target: 'line' | 'figure' | 'step', id: Id): string {
    return wordsOf(this.draft.document, this.draft.numbers)[target](id)
  }
}

const NOTHING: RichText = { type: 'doc', content: [] }
