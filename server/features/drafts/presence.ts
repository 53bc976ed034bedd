const LIFE_MS = 60_000

interface Here {
  name: string
  step: string | null
  at: number
}

/**
 * Who was in which draft within the last minute. Kept in memory alone: after a restart everybody says so again within seconds.
 */
export class Presence {
  private readonly guides = new Map<string, Map<string, Here>>()

  constructor(private readonly now: () => Date) {}

  /** Notes somebody, and tells who else is there, in the order in which they came. */
  say(guideId: string, person: { id: string; name: string }, step: string | null): Here[] {
    const at = this.now().getTime()
    this.forgetBefore(at - LIFE_MS)
    const here = this.guides.get(guideId) ?? new Map<string, Here>()
    this.guides.set(guideId, here)
    here.set(person.id, { name: person.name, step, at })
    return [...here].flatMap(([id, other]) => (id === person.id ? [] : [other]))
  }

  private forgetBefore(time: number): void {
    for (const [guideId, here] of this.guides) {
      for (const [id, { at }] of here) if (at < time) here.delete(id)
      if (here.size === 0) this.guides.delete(guideId)
    }
  }
}
