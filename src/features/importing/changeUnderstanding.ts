import type { Understanding, UnderstoodSection, UnderstoodStep } from '../../../shared/api/imports'

/** Changes to what was understood; each gives a new value. */
export type Change = (understanding: Understanding) => Understanding

/** Sets fields of the piece with this key, wherever it stands. Keys are unique within an understanding. */
export function setPiece(key: string, patch: Record<string, unknown>): Change {
  const walk = (value: unknown): unknown => {
    if (Array.isArray(value)) return value.map(walk)
    if (value === null || typeof value !== 'object') return value
    const piece = value as Record<string, unknown>
    if (piece.key === key) return { ...piece, ...patch }
    return Object.fromEntries(Object.entries(piece).map(([name, inside]) => [name, walk(inside)]))
  }
  return (understanding) => walk(understanding) as Understanding
}

/** Joins a step to the one before it in its section: texts, figures, uses and cautions follow each other, times add up. */
export function joinToBefore(key: string): Change {
  return (understanding) => ({
    ...understanding,
    sections: understanding.sections.map((section) => {
      const at = section.steps.findIndex((step) => step.key === key)
      if (at < 1) return section
      const before = section.steps[at - 1]!
      const step = section.steps[at]!
      return {
        ...section,
        steps: [...section.steps.slice(0, at - 1), joined(before, step), ...section.steps.slice(at + 1)],
      }
    }),
  })
}

function joined(before: UnderstoodStep, step: UnderstoodStep): UnderstoodStep {
  return {
    ...before,
    body: { type: 'doc', content: [...before.body.content, ...step.body.content] },
    minutes:
      before.minutes === null && step.minutes === null ? null : (before.minutes ?? 0) + (step.minutes ?? 0),
    figures: [...before.figures, ...step.figures],
    uses: [...before.uses, ...step.uses],
    cautions: [...before.cautions, ...step.cautions],
  }
}

/** Begins a new section with this step. */
export function beginSection(key: string): Change {
  return (understanding) => ({
    ...understanding,
    sections: understanding.sections.flatMap((section): UnderstoodSection[] => {
      const at = section.steps.findIndex((step) => step.key === key)
      if (at < 1) return [section]
      const step = section.steps[at]!
      return [
        { ...section, steps: section.steps.slice(0, at) },
        {
          ...section,
          key: `${section.key}-${key}`.slice(0, 60),
          title: step.title,
          steps: section.steps.slice(at),
        },
      ]
    }),
  })
}

/** How much of it will be taken. */
export function counts({ sections, lines, models }: Understanding) {
  const steps = sections
    .filter(({ include }) => include)
    .flatMap((section) => section.steps.filter(({ include }) => include))
  const figures = steps.flatMap((step) => step.figures.filter((figure) => figure.include))
  return {
    steps: steps.length,
    figures: figures.filter(({ state }) => state === 'found').length,
    noPicture: figures.filter(({ state }) => state !== 'found').length,
    lines: lines.filter(({ include }) => include).length,
    noQuantity: lines.filter(({ include, quantity, asNeeded }) => include && quantity === null && !asNeeded)
      .length,
    models: models.filter(({ include }) => include).length,
  }
}
