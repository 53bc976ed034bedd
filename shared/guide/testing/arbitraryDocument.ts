import type fc from 'fast-check'
import { unitCodes, UNITS, type UnitCode } from '../../lib/units/units'
import type {
  Block,
  Callout,
  Caution,
  Check,
  Condition,
  Figure,
  GuideDocument,
  Inline,
  Line,
  ListItem,
  Option,
  Place,
  Quantity,
  Step,
  Use,
} from '../schema'
import { arbitraryDraws, countedIds, type Draws } from './draws'

export const WORDS = [
  'shaft',
  'Bolt M8',
  'turn it',
  'مضخة',
  'छड़',
  '水',
  '0.5',
  '🔩',
  'the runner',
  '12 mm',
  '"',
]
const LENGTHS: UnitCode[] = ['mm', 'cm', 'm', 'in', 'ft']
/** Any hash will do where no file is read. */
const hashNo = (number: number): string => String(number).padStart(64, '0')

/** Small whole documents in which every kind of node, mark and condition can occur, and every reference leads somewhere. */
export const arbitraryDocument: fc.Arbitrary<GuideDocument> = arbitraryDraws(400).map((draws) =>
  new DocumentMaker(draws, 'base').document(),
)

/** Makes nodes by draws. `ids` names the maker, so that what two of them add has different ids. */
export class DocumentMaker {
  readonly newId: (kind: string) => string
  private lines: Line[] = []
  private stepIds: string[] = []
  private figures: Figure[] = []

  constructor(
    private readonly draws: Draws,
    ids: string,
  ) {
    this.newId = countedIds(ids)
  }

  document(): GuideDocument {
    const { draws } = this
    this.lines = []
    draws.list(4, () => this.lines.push(this.line()))
    const models = draws.list(2, (index) => ({
      id: this.newId('model'),
      asset: hashNo(index),
      name: this.words(),
      unit: draws.of(['mm', 'cm', 'm', 'in'] as const),
      material: this.words(),
    }))
    for (const option of this.lines.flatMap(({ options }) => options)) {
      if (option.print !== undefined && models.length > 0) option.print.model = draws.of(models).id
    }
    this.figures = draws.list(3, () => this.figure())
    const tools = draws.list(2, () => ({ id: this.newId('tool'), name: this.words(), ...this.when() }))
    const stepCounts = [1 + draws.below(3), ...draws.list(2, () => draws.below(3))]
    this.stepIds = stepCounts.flatMap((count) => Array.from({ length: count }, () => this.newId('step')))
    const left = [...this.stepIds]
    return {
      schema: 1,
      lang: draws.of(['en', 'ar', 'hi', 'zh']),
      title: this.words(),
      summary: this.words(),
      machine: draws.of(['pump', 'stove', 'other'] as const),
      licence: draws.of(['', 'CERN-OHL-S-2.0', 'nonsense']),
      credits: draws.list(2, () => ({ id: this.newId('credit'), name: this.words(), role: this.words() })),
      front: this.figures.length > 0 && draws.yes() ? draws.of(this.figures).id : null,
      cautions: draws.list(2, () => this.caution()),
      skills: draws.list(2, () => ({ id: this.newId('skill'), name: this.words() })),
      sections: stepCounts.map((count) => ({
        id: this.newId('section'),
        title: this.words(),
        steps: left.splice(0, count).map((id) => ({
          ...this.step(id),
          tools: draws.some(tools).map((tool) => tool.id),
          models: draws.some(models).map((model) => model.id),
        })),
      })),
      lines: this.lines,
      tools,
      figures: this.figures,
      models,
      claims: draws.list(2, () => ({
        id: this.newId('claim'),
        label: this.words(),
        quantity: { value: '198', unit: 'W', uncertainty: draws.maybe(() => '6') },
        conditions: this.words(),
        evidence: draws.of([{ kind: 'none' }, { kind: 'bench run', text: 'run 9' }] as const),
        ...this.when(),
      })),
      sheets: draws.list(1, () => ({
        id: this.newId('sheet'),
        title: this.words(),
        inputs: [{ id: this.newId('input'), symbol: 'Q', label: this.words(), unit: 'l/s', typical: '12.5' }],
        formulas: [
          { id: this.newId('formula'), symbol: 'P', expression: '9.81 * Q', unit: 'W', ...this.when() },
        ],
        results: [{ id: this.newId('result'), symbol: 'P', label: this.words(), assumption: this.words() }],
      })),
      assets: draws.list(2, (index) => ({
        sha256: hashNo(index),
        mediaType: 'image/png',
        bytes: draws.below(5000),
        name: this.words(),
      })),
    }
  }

  line(): Line {
    const { draws } = this
    return {
      id: this.newId('line'),
      kind: draws.of(['bought', 'printed', 'cut', 'made', 'consumable'] as const),
      quantity: draws.yes(4) ? null : this.quantity(),
      note: draws.yes(3) ? this.words() : '',
      ...(draws.yes(4) ? { sparePercent: '10' } : {}),
      ...(draws.yes(4) && this.lines.length > 0 ? { within: draws.of(this.lines).id } : {}),
      ...this.when(),
      options: [this.option(), ...draws.list(2, () => this.option())],
    }
  }

  option(): Option {
    const { draws } = this
    return {
      id: this.newId('option'),
      part: {
        key: '',
        name: this.words(),
        specification: draws.yes() ? this.words() : '',
        ...(draws.yes(4) ? { mass: { value: '0.2', unit: 'kg' as const } } : {}),
      },
      regions: draws.some(['DE', '404']),
      requires: [],
      excludes: [],
      sources: draws.list(1, () => ({
        id: this.newId('source'),
        supplier: this.words(),
        address: 'https://example.org/',
        price: '1.20',
        searchWords: this.words(),
      })),
      ...(draws.yes(4)
        ? { print: { model: null, material: 'PETG', layer: null, walls: 3, infill: null, supports: false } }
        : {}),
    }
  }

  step(id = this.newId('step')): Step {
    const { draws } = this
    return {
      id,
      title: this.words(),
      ...this.when(),
      body: { type: 'doc', content: draws.list(3, () => this.block()) },
      uses: draws.list(3, () => this.use()).filter((use): use is Use => use !== undefined),
      tools: [],
      cautions: draws.list(1, () => this.caution()),
      checks: draws.list(1, () => this.check()),
      figures: draws.some(this.figures).map((figure) => figure.id),
      models: [],
      minutes: draws.yes(3) ? null : draws.below(90),
      people: 1 + draws.below(2),
    }
  }

  use(): Use | undefined {
    const { draws } = this
    if (this.lines.length === 0) return undefined
    const line = draws.of(this.lines)
    return {
      id: this.newId('use'),
      line: line.id,
      quantity: draws.yes(4) ? null : this.quantity(draws.yes(5) ? undefined : line.quantity?.unit),
      ...this.when(),
    }
  }

  check(): Check {
    return {
      id: this.newId('check'),
      text: this.words(),
      measure: this.draws.yes()
        ? { unit: 'mm', atLeast: '0.8', atMost: this.draws.maybe(() => '1.2') ?? null, oneSided: false }
        : null,
      ...(this.draws.yes(3) ? { otherwise: this.words() } : {}),
      ...this.when(),
    }
  }

  caution(): Caution {
    return {
      id: this.newId('caution'),
      signal: this.draws.of(['danger', 'warning', 'caution', 'notice'] as const),
      hazard: this.words(),
      avoid: this.words(),
      wear: this.draws.some(['M004', 'M009']),
      ...this.when(),
    }
  }

  figure(): Figure {
    return {
      id: this.newId('figure'),
      kind: this.draws.of(['photo', 'view', 'clip'] as const),
      asset: this.draws.maybe(() => hashNo(this.draws.below(2))) ?? null,
      caption: this.words(),
      alt: this.words(),
      callouts: this.draws.list(2, () => this.callout()),
      ...this.when(),
    }
  }

  callout(): Callout {
    const { draws } = this
    const mark = { id: this.newId('callout'), at: draws.maybe(() => this.place()) ?? null, ...this.when() }
    const tip = draws.maybe(() => this.place()) ?? null
    if (this.lines.length > 0 && draws.yes())
      return { ...mark, shape: 'balloon', line: draws.of(this.lines).id, tip }
    if (draws.yes()) return { ...mark, shape: 'dimension', tip, value: { value: '-0.1', unit: 'mm' } }
    return { ...mark, shape: draws.of(['arrow', 'area'] as const), tip, text: this.words() }
  }

  block(depth = 0): Block {
    const { draws } = this
    const shape = depth > 1 ? 0 : draws.below(4)
    if (shape === 1 || shape === 2) {
      const type = shape === 1 ? 'orderedList' : 'bulletList'
      return {
        type,
        attrs: { id: this.newId('list') },
        content: [this.item(depth), ...draws.list(2, () => this.item(depth))],
      }
    }
    if (shape === 3)
      return { type: 'note', attrs: { id: this.newId('note') }, content: [this.block(depth + 1)] }
    const content = draws.list(3, () => this.inline())
    return {
      type: 'paragraph',
      attrs: { id: this.newId('paragraph') },
      ...(content.length > 0 ? { content } : {}),
    }
  }

  item(depth = 0): ListItem {
    return {
      type: 'listItem',
      attrs: { id: this.newId('item'), ...this.when() },
      content: [this.block(depth + 1)],
    }
  }

  inline(): Inline {
    const { draws } = this
    switch (draws.below(6)) {
      case 1:
        return { type: 'lineBreak' }
      case 2:
        return { type: 'quantity', attrs: { value: '-3.50', unit: 'degC', typed: '-3.5 °C' } }
      case 3:
        if (this.lines.length > 0) return { type: 'balloon', attrs: { line: draws.of(this.lines).id } }
        break
      case 4:
        if (this.figures.length > 0)
          return { type: 'figureRef', attrs: { figure: draws.of(this.figures).id } }
        break
      case 5:
        if (this.stepIds.length > 0) return { type: 'stepRef', attrs: { step: draws.of(this.stepIds) } }
        break
      default:
        break
    }
    const text: Inline = { type: 'text', text: draws.of(WORDS) }
    return draws.yes(3)
      ? { ...text, marks: [{ type: 'strong' }, { type: 'link', attrs: { href: 'https://example.org/' } }] }
      : text
  }

  quantity(unit: UnitCode = this.draws.of(unitCodes)): Quantity {
    const value = `${this.draws.below(40)}${this.draws.yes(3) ? '.125' : ''}`
    // A length may stand in any unit of length; others keep theirs.
    return {
      value,
      unit: UNITS[unit].dimension === 'length' && this.draws.yes() ? this.draws.of(LENGTHS) : unit,
    }
  }

  words(): string {
    return this.draws.list(2, () => this.draws.of(WORDS)).join(' ')
  }

  /** Knows the lines made so far, so a condition never leads in a circle. */
  private when(): { when?: Condition } {
    const { draws } = this
    const lines = this.lines.filter(({ options }) => options.length > 1)
    if (lines.length === 0 || !draws.yes(4)) return {}
    const line = draws.of(lines)
    const some = draws.some(line.options).map(({ id }) => id)
    return { when: [{ line: line.id, is: some.length > 0 ? some : [line.options[0]!.id] }] }
  }

  private place(): Place {
    return { x: this.draws.below(10001), y: this.draws.below(10001) }
  }
}
