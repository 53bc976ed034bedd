import { emptyDocument } from '../guide/emptyDocument'
import type {
  Asset,
  Caution,
  Figure,
  GuideDocument,
  Line,
  Model,
  Option,
  RichText,
  Section,
  Step,
  Tool,
  Use,
} from '../guide/schema'
import type { Block } from '../guide/schema/text'
import type { Id, NewId } from '../lib/ids/id'
import { LanguageTag } from '../lib/language/direction'
import { webAddress } from './linesOfTable'
import type {
  Understanding,
  UnderstoodFigure,
  UnderstoodLine,
  UnderstoodModel,
  UnderstoodSection,
  UnderstoodStep,
} from './understanding'

/**
 * The document that an understanding gives, with what a person left out left out. With a `base` everything is added to it: nothing in
 * it is changed, and its title, summary and licence are filled only where they are empty.
 * @param assets what the site knows of each file, by its hash. A file that is not there becomes an empty place for a picture.
 */
export function toDocument(
  understanding: Understanding,
  newId: NewId,
  assets: ReadonlyMap<string, Asset>,
  base?: GuideDocument,
): GuideDocument {
  return new Taking(understanding, newId, assets).taken(base)
}

class Taking {
  private readonly lineIds = new Map<string, Id>()
  private readonly modelIds = new Map<string, Id>()
  private readonly used = new Map<string, Asset>()
  private readonly figures: Figure[] = []

  constructor(
    private readonly from: Understanding,
    private readonly newId: NewId,
    private readonly assets: ReadonlyMap<string, Asset>,
  ) {}

  taken(base: GuideDocument | undefined): GuideDocument {
    const { from, newId } = this
    const lang = LanguageTag.safeParse(from.lang)
    const start = base ?? {
      ...emptyDocument(newId, { lang: lang.success ? lang.data : 'en', title: from.title }),
      sections: [],
    }
    const models = from.models.filter(({ include }) => include).flatMap((model) => this.model(model) ?? [])
    const lines = from.lines.filter(({ include }) => include).map((line) => this.line(line))
    const sections = from.sections
      .filter(({ include }) => include)
      .map((section) => this.section(section))
      .filter(({ steps }) => steps.length > 0)
    const all = [...start.sections, ...sections]
    const known = new Set(start.assets.map(({ sha256 }) => sha256))
    return {
      ...start,
      title: start.title || from.title,
      summary: start.summary || from.summary,
      licence: start.licence || from.licence,
      sections: all.length > 0 ? all : emptyDocument(newId, { lang: start.lang, title: '' }).sections,
      lines: [...start.lines, ...lines],
      tools: [
        ...start.tools,
        ...from.tools.filter(({ include }) => include).map(({ name }): Tool => ({ id: newId(), name })),
      ],
      figures: [...start.figures, ...this.figures],
      models: [...start.models, ...models],
      assets: [...start.assets, ...[...this.used.values()].filter(({ sha256 }) => !known.has(sha256))],
    }
  }

  private asset(sha256: string | null): Asset | undefined {
    const asset = sha256 === null ? undefined : this.assets.get(sha256)
    if (asset !== undefined) this.used.set(asset.sha256, asset)
    return asset
  }

  private model(model: UnderstoodModel): Model | undefined {
    const asset = this.asset(model.sha256)
    if (asset === undefined) return undefined
    const id = this.newId()
    this.modelIds.set(model.key, id)
    return { id, asset: asset.sha256, name: model.name, unit: 'mm', material: '' }
  }

  private line(line: UnderstoodLine): Line {
    const id = this.newId()
    this.lineIds.set(line.key, id)
    const own = this.option(line, line.name)
    // A list that does not say how many has "as needed" nowhere: the note says so until a person does.
    const untold = line.quantity === null && !line.asNeeded
    const said =
      line.typed === '' ? 'The list does not say how many.' : `Quantity in the list: ${line.typed}.`
    return {
      id,
      kind: line.kind,
      quantity: line.quantity === null ? null : withTyped(line),
      note: (untold ? [said, line.note].filter((text) => text !== '').join(' ') : line.note).slice(0, 4000),
      options: [
        own,
        ...line.substitutes
          .filter((name) => name !== '')
          .map((name) =>
            this.option({ ...line, specification: '', designation: '', sources: [], modelKey: null }, name),
          ),
      ],
    }
  }

  private option(line: UnderstoodLine, name: string): Option {
    const model = line.modelKey === null ? undefined : this.modelIds.get(line.modelKey)
    return {
      id: this.newId(),
      part: {
        key: '',
        name,
        specification: line.specification,
        ...(line.designation === '' ? {} : { designation: line.designation }),
      },
      regions: [],
      requires: [],
      excludes: [],
      sources: line.sources.map((source) => ({
        id: this.newId(),
        ...source,
        address: webAddress(source.address),
      })),
      ...(line.kind === 'printed'
        ? {
            print: {
              model: model ?? null,
              material: '',
              layer: null,
              walls: null,
              infill: null,
              supports: null,
            },
          }
        : {}),
    }
  }

  private section(section: UnderstoodSection): Section {
    return {
      id: this.newId(),
      title: section.title,
      steps: section.steps.filter(({ include }) => include).map((step) => this.step(step)),
    }
  }

  private step(step: UnderstoodStep): Step {
    return {
      id: this.newId(),
      title: step.title,
      body: this.body(step.body),
      uses: step.uses
        .filter(({ include }) => include)
        .flatMap((use): Use[] => {
          const line = this.lineIds.get(use.lineKey)
          return line === undefined ? [] : [{ id: this.newId(), line, quantity: use.quantity }]
        }),
      tools: [],
      cautions: step.cautions
        .filter(({ include }) => include)
        .map(({ signal, text }): Caution => ({
          id: this.newId(),
          signal,
          hazard: text,
          avoid: '',
          wear: [],
        })),
      checks: [],
      figures: step.figures.filter(({ include }) => include).map((figure) => this.figure(figure)),
      models: [],
      minutes: step.minutes,
      people: 1,
    }
  }

  private figure(figure: UnderstoodFigure): Id {
    const id = this.newId()
    const asset = this.asset(figure.sha256)
    this.figures.push({
      id,
      kind: 'photo',
      asset: asset?.sha256 ?? null,
      caption: figure.caption,
      alt: figure.alt,
      callouts: [],
    })
    return id
  }

  /** The same text with lasting ids. What it refers to in another document is gone. */
  private body(body: RichText): RichText {
    return { type: 'doc', content: body.content.map((block) => this.block(block)) }
  }

  private block(block: Block): Block {
    const attrs = { id: this.newId() }
    switch (block.type) {
      case 'paragraph':
        return { ...block, attrs }
      case 'note':
        return { ...block, attrs, content: block.content.map((inner) => this.block(inner)) }
      case 'orderedList':
      case 'bulletList':
        return {
          ...block,
          attrs,
          content: block.content.map((item) => ({
            type: 'listItem',
            attrs: { id: this.newId() },
            content: item.content.map((inner) => this.block(inner)),
          })),
        }
    }
  }
}

/** What was typed stays beside the number where it says more. */
function withTyped(line: UnderstoodLine): Line['quantity'] {
  const { quantity, typed } = line
  if (quantity === null || quantity.typed !== undefined || typed === '' || typed === quantity.value)
    return quantity
  return quantity.unit === 'each' && !/^\d+$/.test(typed)
    ? { ...quantity, typed: typed.slice(0, 60) }
    : quantity
}
