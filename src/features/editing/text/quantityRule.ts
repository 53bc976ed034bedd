import { Extension, InputRule } from '@tiptap/core'
import { parseMeasure } from '../../../../shared/guide/parseQuantity'
import { UNITS, type Unit } from '../../../../shared/lib/units/units'

/**
 * "4 mm " becomes a number with its unit as it is typed; Backspace right after it gives the letters back. Counts stay words, since "2
 * sets" is one in any sentence, and " in " only follows a number closely: "4in", "1/2 in" with a space is mostly English.
 */
export const quantityRule = Extension.create({
  name: 'quantityRule',
  addInputRules() {
    const { quantity } = this.editor.schema.nodes
    return [
      new InputRule({
        find: AS_TYPED,
        handler: ({ state, range, match }) => {
          const measure = measureIn(match[2]!)
          if (measure === undefined || quantity === undefined) return null
          const from = range.from + match[1]!.length
          const marks = state.doc.resolve(from).marks()
          const end = match[3]!
          state.tr.replaceWith(from, range.to, [
            quantity.create(measure, null, marks),
            state.schema.text(end, marks),
          ])
          return undefined
        },
      }),
    ]
  },
})

const AS_TYPED =
  /(^|[\s(\u00a0±~])([-−]?[\d٠-٩۰-۹][^\sA-Za-z]*(?:\s\d+\/\d+)?[\s\u00a0]?\p{L}?[^\s\d.,;:)]{0,6})([\s.,;:)])$/u

const NEVER: ReadonlySet<string> = new Set(['one', 'each', 'd', 't'])

/** The number and unit that stand here, where they are both and nothing but that. */
export function measureIn(text: string) {
  const parsed = parseMeasure(text, 'one')
  if (!parsed.ok) return undefined
  const { measure } = parsed
  const unit: Unit = UNITS[measure.unit]
  if (NEVER.has(measure.unit) || unit.dimension === 'count') return undefined
  if (measure.unit === 'in' && /\sin$/i.test(text)) return undefined
  return measure
}
