import { choicesFor, namesOfChoices } from '../choices'
import type { Choices } from '../holds'
import { holds } from '../holds'
import { reconcileLine, type Balance, type Reconciled } from '../reconcile'
import type { Line } from '../schema'
import {
  amountValues,
  isBlank,
  lineValues,
  onParts,
  type Found,
  type Look,
  type Rule,
  type Values,
} from './rule'

/** Rules about the parts list, above all: that it adds up with the steps, whatever is chosen. */
export const lineRules = {
  'line-more-used': { must: true, find: balanced('more used'), concerns: hasLines },
  'line-more-listed': { must: true, find: balanced('more listed'), concerns: hasLines },
  'line-units-differ': { must: true, find: balanced('units differ'), concerns: hasLines },
  'line-no-quantity': { must: true, find: balanced('no quantity'), concerns: hasLines },
  'line-unused': { must: false, find: balanced('unused'), concerns: hasLines },
  'line-uncounted': {
    must: false,
    find: (look) =>
      balanced('as needed')(look).filter(({ place }) => {
        const line = look.doc.lines.find(({ id }) => id === place.node)
        return line !== undefined && line.quantity !== null && line.kind !== 'consumable'
      }),
    concerns: hasLines,
  },
  'part-unnamed': {
    must: true,
    find: (look) =>
      look.doc.lines.flatMap((line) =>
        line.options.some(({ part }) => isBlank(part.name))
          ? [{ place: onParts(line.id, 'name'), values: lineValues(look, line) }]
          : [],
      ),
    concerns: hasLines,
  },
  'line-no-specification': {
    must: false,
    find: (look) =>
      look.doc.lines.flatMap((line) =>
        line.options.some(({ part }) => isBlank(part.specification))
          ? [{ place: onParts(line.id, 'specification'), values: lineValues(look, line) }]
          : [],
      ),
    concerns: hasLines,
  },
  'printed-no-model': {
    must: true,
    find: (look) =>
      look.doc.lines.flatMap((line) =>
        line.kind === 'printed' && line.options.every(({ print }) => (print?.model ?? null) === null)
          ? [{ place: onParts(line.id, 'model'), values: lineValues(look, line) }]
          : [],
      ),
    concerns: ({ doc }) => doc.lines.some(({ kind }) => kind === 'printed'),
  },
} satisfies Record<string, Rule>

function hasLines({ doc }: Look): boolean {
  return doc.lines.length > 0
}

/** Lines with this balance: under the designer's choices where it is so there, else under the first others that give it. */
function balanced(balance: Balance): (look: Look) => Found[] {
  return (look) =>
    balances(look).flatMap(({ line, cases }): Found[] => {
      const found = cases.find((each) => each.is.balance === balance)
      if (found === undefined) return []
      // A sub-assembly is used by what stands within it.
      if (balance === 'unused' && look.doc.lines.some(({ within }) => within === line.id)) return []
      return [
        {
          place: onParts(line.id, 'quantity'),
          values: { ...lineValues(look, line), ...quantities(found.is), ...withChoices(look, found.choices) },
        },
      ]
    })
}

function quantities({ used, listed }: Reconciled): Values {
  return {
    ...(used === null ? {} : amountValues('used', used)),
    ...(listed === null ? {} : amountValues('listed', listed)),
  }
}

/** `context` picks the sentence that says with which choices. */
const withChoices = ({ doc }: Look, choices: Choices): Values => {
  const names = namesOfChoices(doc, choices)
  return names === '' ? {} : { context: 'with', with: names }
}

interface Balances {
  line: Line
  /** One for each set of choices that makes a difference to the line and under which it is there; the designer's has no names. */
  cases: { choices: Choices; is: Reconciled }[]
}

/** Worked out once for all rules that ask. */
const known = new WeakMap<Look, Balances[]>()

function balances(look: Look): Balances[] {
  const before = known.get(look)
  if (before !== undefined) return before
  const found = look.doc.lines.map((line) => balancesOf(look, line))
  known.set(look, found)
  return found
}

function balancesOf(look: Look, line: Line): Balances {
  const { doc } = look
  const uses = look.uses.get(line.id) ?? []
  const conditions = [line.when, ...uses.flatMap(({ step, use }) => [step.when, use.when])]
  const cases = [{}, ...choicesFor(doc, conditions)]
    .filter((choices, index) => index === 0 || Object.keys(choices).length > 0)
    .filter((choices) => holds(doc, choices, line.when))
    .map((choices) => ({ choices, is: reconcileLine(doc, line, uses, choices) }))
  return { line, cases }
}
