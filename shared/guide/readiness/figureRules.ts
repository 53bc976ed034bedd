import type { Figure, Step } from '../schema'
import { isBlank, onStepOrGuide, type Found, type Look, type Rule, type Values } from './rule'

/** Rules about the figures that a reader sees. */
export const figureRules = {
  'figure-no-picture': {
    must: true,
    find: figuresWhere(({ asset }) => asset === null, 'asset'),
    concerns: hasFigures,
  },
  'figure-no-alt': {
    must: false,
    find: figuresWhere(({ alt }) => isBlank(alt), 'alt'),
    concerns: hasFigures,
  },
  'figure-no-caption': {
    must: false,
    find: figuresWhere(({ caption }) => isBlank(caption), 'caption'),
    concerns: hasFigures,
  },
  'callout-not-placed': {
    must: false,
    find: (look) =>
      look.shown.flatMap(({ figure, step }) =>
        figure.callouts.flatMap((callout, index): Found[] =>
          callout.at === null
            ? [
                {
                  place: onStepOrGuide(step, callout.id, 'at'),
                  values: {
                    ...figureValues(look, figure),
                    callout:
                      callout.shape === 'balloon'
                        ? (look.numbers.line[callout.line] ?? index + 1)
                        : (callout.text ?? index + 1),
                  },
                },
              ]
            : [],
        ),
      ),
    concerns: ({ shown }) => shown.some(({ figure }) => figure.callouts.length > 0),
  },
} satisfies Record<string, Rule>

function hasFigures({ shown }: Look): boolean {
  return shown.length > 0
}

export const figureValues = ({ numbers }: Look, figure: Figure): Values => ({
  figure: numbers.figure[figure.id]!,
})

function figuresWhere(
  isWrong: (figure: Figure) => boolean,
  field: string,
): (look: Look) => { place: ReturnType<typeof onStepOrGuide>; values: Values }[] {
  return (look) =>
    look.shown
      .filter(({ figure }) => isWrong(figure))
      .map(({ figure, step }: { figure: Figure; step: Step | null }) => ({
        place: onStepOrGuide(step, figure.id, field),
        values: figureValues(look, figure),
      }))
}
