import { Extension } from '@tiptap/core'
import { PluginKey } from '@tiptap/pm/state'
import { Suggestion, type SuggestionProps } from '@tiptap/suggestion'
import { pickableParts, pickableReferences, type Pick } from './pickable'
import type { TextHost } from './textHost'

/** The list that is open under the cursor. */
export interface OpenPick {
  picks: readonly Pick[]
  at: number
  query: string
  rect: DOMRect | null
  choose: (pick: Pick) => void
}

/** What is open, for React to look at; the editor's keys move in it. */
export class PickStore {
  private open: OpenPick | null = null
  private readonly watchers = new Set<() => void>()

  readonly watch = (watcher: () => void): (() => void) => {
    this.watchers.add(watcher)
    return () => this.watchers.delete(watcher)
  }
  readonly look = (): OpenPick | null => this.open

  show(open: OpenPick | null): void {
    this.open = open !== null && open.picks.length === 0 ? null : open
    for (const watcher of this.watchers) watcher()
  }

  /** @returns whether the key was the list's. */
  key(key: string): boolean {
    const { open } = this
    if (open === null) return false
    const step = { ArrowDown: 1, ArrowUp: -1 }[key]
    if (step !== undefined) {
      this.show({ ...open, at: (open.at + step + open.picks.length) % open.picks.length })
      return true
    }
    if (key !== 'Enter' && key !== 'Tab') return false
    open.choose(open.picks[open.at]!)
    return true
  }
}

/** "@" opens the list of parts, "#" the list of steps and figures. */
export const picking = (host: TextHost, store: PickStore) =>
  Extension.create({
    name: 'picking',
    addProseMirrorPlugins() {
      const { editor } = this
      const list = (char: string, items: (query: string) => Pick[]) =>
        Suggestion<Pick, Pick>({
          editor,
          char,
          pluginKey: new PluginKey(`pick ${char}`),
          allowSpaces: char === '@',
          allowedPrefixes: [' ', '\u00a0', '(', '“', '«', '،'],
          items: ({ query }) => items(query),
          command: ({ range, props }) => host.acts?.choose(props, range),
          render: () => {
            const show = (props: SuggestionProps<Pick, Pick>): void => {
              const before = store.look()
              store.show({
                picks: props.items,
                at:
                  before !== null && before.query === props.query
                    ? Math.min(before.at, props.items.length - 1)
                    : 0,
                query: props.query,
                rect: props.clientRect?.() ?? null,
                choose: props.command,
              })
            }
            return {
              onStart: show,
              onUpdate: show,
              onKeyDown: ({ event }) => store.key(event.key),
              onExit: () => store.show(null),
            }
          },
        })
      return [
        list('@', (query) => pickableParts(host.now, query)),
        list('#', (query) => pickableReferences(host.now, query, host.stepId)),
      ]
    },
  })
