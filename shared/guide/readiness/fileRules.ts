import type { FileFacts } from '../facts'
import type { FindingPlace } from '../finding'
import type { Model } from '../schema'
import { onParts, onStep, onStepOrGuide, orNameless, type Found, type Look, type Rule } from './rule'

/** Rules about files and models. */
export const fileRules = {
  'file-missing': { must: true, find: filesWhere((file) => file === undefined), concerns: hasFiles },
  'file-failed': { must: true, find: filesWhere((file) => file?.state === 'failed'), concerns: hasFiles },
  'file-working': { must: false, find: filesWhere((file) => file?.state === 'working'), concerns: hasFiles },
  'model-no-line': {
    must: false,
    find: (look) => {
      const printed = new Set(
        look.doc.lines.flatMap(({ options }) => options.map(({ print }) => print?.model ?? null)),
      )
      return look.doc.models
        .filter(({ id }) => !printed.has(id))
        .map((model) => ({ place: placeOf(look, model), values: { model: orNameless(model.name) } }))
    },
    concerns: hasModels,
  },
  'model-defects': {
    must: false,
    find: (look) =>
      look.doc.models.flatMap((model): Found[] => {
        const facts = look.facts.files.get(model.asset)?.model
        if (facts === undefined || facts === null) return []
        const { closed, openEdges, backwardsEdges, nonManifoldEdges, degenerateFacets } = facts
        if (closed && openEdges + backwardsEdges + nonManifoldEdges + degenerateFacets === 0) return []
        return [
          {
            place: placeOf(look, model),
            values: {
              model: orNameless(model.name),
              open: openEdges,
              backwards: backwardsEdges,
              shared: nonManifoldEdges,
              degenerate: degenerateFacets,
            },
          },
        ]
      }),
    concerns: hasModels,
  },
} satisfies Record<string, Rule>

function hasFiles({ doc, shown }: Look): boolean {
  return doc.models.length > 0 || shown.some(({ figure }) => figure.asset !== null)
}

function hasModels({ doc }: Look): boolean {
  return doc.models.length > 0
}

/** The step that shows a model, else the line that prints it, else the parts list. */
function placeOf({ doc, steps }: Look, model: Model): FindingPlace {
  const step = steps.find(({ models }) => models.includes(model.id))
  if (step !== undefined) return onStep(step.id, model.id, null)
  const line = doc.lines.find(({ options }) => options.some(({ print }) => print?.model === model.id))
  return onParts(line?.id ?? null, 'model')
}

/** Files of figures that are shown and of models, by what is known of each. */
function filesWhere(isWrong: (file: FileFacts | undefined) => boolean): (look: Look) => Found[] {
  return (look) => {
    const names = new Map(look.doc.assets.map(({ sha256, name }) => [sha256, name]))
    const found = (asset: string, place: FindingPlace, name: string): Found[] => {
      const file = look.facts.files.get(asset)
      if (!isWrong(file)) return []
      const values = { file: orNameless(file?.name ?? names.get(asset) ?? name) }
      return [
        {
          place,
          values:
            typeof file?.trouble !== 'string' ? values : { ...values, context: 'why', trouble: file.trouble },
        },
      ]
    }
    return [
      ...look.shown.flatMap(({ figure, step }) =>
        figure.asset === null
          ? []
          : found(figure.asset, onStepOrGuide(step, figure.id, 'asset'), figure.caption),
      ),
      ...look.doc.models.flatMap((model) => found(model.asset, placeOf(look, model), model.name)),
    ]
  }
}
