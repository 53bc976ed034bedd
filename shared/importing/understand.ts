import { isLicenceFile, isOld, languageInName, languageOf, licenceOf, modelName, numberInName } from './about'
import type { BroughtFile } from './broughtFile'
import { divide, type Division, type Portion } from './divide'
import { findCautions } from './findCautions'
import { findFile } from './findFile'
import { findMinutes } from './findMinutes'
import { nameKey, takeParts, usesInText, usesOfList, type FoundUse } from './findUses'
import { linesOfTable, type LineOfRow } from './linesOfTable'
import { orderPages } from './orderPages'
import { picturesOf, plainPiece, plainWords, type Page, type Picture, type Piece } from './page'
import { readCells } from './readCells'
import { readMarkdown } from './readMarkdown'
import { cellOf, isPartsList, plainCell, readTable } from './readTable'
import { bareTitle, isChoice, isPartsTitle } from './titles'
import { isWordless, toBody } from './toBody'
import type {
  Understanding,
  UnderstoodFigure,
  UnderstoodLine,
  UnderstoodModel,
  UnderstoodStep,
  UnderstoodTable,
  UnderstoodUse,
} from './understanding'

const PAGE = /\.(md|markdown|mdown|mkd|txt)$/i
const CELLS = /\.(csv|tsv|tab)$/i

interface ReadPage {
  path: string
  page: Page
  text: string
  leadsTo: string[]
}

/**
 * What the files of a design say: sections and steps, parts, models, and everything that was not used, with the reason. Pure and
 * repeatable; it never throws, and what it guesses is offered and not decided.
 */
export function understand(files: readonly BroughtFile[]): Understanding {
  return new Reading(files).understand()
}

class Reading {
  private readonly paths: Set<string>
  private readonly byPath: Map<string, BroughtFile>
  private readonly result: Understanding = {
    title: '',
    lang: 'en',
    licence: '',
    summary: '',
    sections: [],
    tables: [],
    lines: [],
    models: [],
    tools: [],
    unused: [],
    choices: [],
  }
  private readonly shown = new Set<string>()
  private readonly addresses = new Map<string, { from: string; addresses: string[] }>()
  private readonly byName = new Map<string, UnderstoodLine>()
  private made = 0

  constructor(private readonly files: readonly BroughtFile[]) {
    this.paths = new Set(files.map(({ path }) => path))
    this.byPath = new Map(files.map((file) => [file.path, file]))
  }

  understand(): Understanding {
    const pages = this.readPages()
    this.sayAbout(pages)
    for (const file of this.files) {
      if (file.kind === 'sheets') this.addSheets(file)
      else if (file.kind === 'text' && CELLS.test(file.path)) this.addCells(file)
    }
    const divided = pages.map((page) => ({ page, division: divide(page.page.pieces, stemOf(page.path)) }))
    const isGuide = divided.some(({ page, division }) => tellsSteps(page, division, divided.length))
    // Parts first, so that a step finds its lines.
    const portions = divided.map(({ page, division }) =>
      this.takeTables(page, division, isGuide, divided.length),
    )
    for (const { page, sections } of portions) this.addSections(page, sections)
    this.addModels()
    this.listUnused()
    return this.bounded()
  }

  private key(kind: string): string {
    this.made += 1
    return `${kind}-${this.made}`
  }

  private unused(what: string, where: string, why: string): void {
    if (this.result.unused.length < 10_000) {
      this.result.unused.push({ what: clean(what, 4000), where: clean(where, 2000), why: clean(why, 4000) })
    }
  }

  // Pages

  private readPages(): ReadPage[] {
    const read: ReadPage[] = []
    for (const file of this.files) {
      if (file.kind !== 'text' || !PAGE.test(file.path) || isLicenceFile(file.path)) continue
      const translated = languageInName(file.path)
      if (translated !== undefined && this.hasPath(translated.base)) {
        const why = `This is ${translated.base} in another language (${translated.lang}). A translation is made beside the guide, once the guide is there.`
        this.unused(file.path, file.path, why)
        continue
      }
      const page = this.readPage(file.path, file.text)
      if (page === undefined) continue
      const leadsTo = page.links.flatMap((link) => {
        const found = findFile(link, file.path, this.paths)
        return found.state === 'found' && PAGE.test(found.path) ? [found.path] : []
      })
      read.push({ path: file.path, page, text: file.text, leadsTo })
      for (const { what, why } of page.left) this.unused(what, file.path, why)
    }
    return orderPages(read)
  }

  private hasPath(path: string): boolean {
    const plain = path.toLowerCase()
    return [...this.paths].some((other) => other.toLowerCase() === plain)
  }

  private readPage(path: string, text: string): Page | undefined {
    try {
      return readMarkdown(clean(text, 2_000_000))
    } catch (error) {
      if (!(error instanceof Error)) throw error
      this.unused(
        path,
        path,
        'This page cannot be read: it is nested too deeply or is not text. Write it anew as plain Markdown.',
      )
      return undefined
    }
  }

  private sayAbout(pages: readonly ReadPage[]): void {
    const main = pages[0]
    const licence = this.files.find((file) => file.kind === 'text' && isLicenceFile(file.path))
    if (licence?.kind === 'text') this.result.licence = licenceOf(licence.text)
    if (main === undefined) {
      const first = this.files[0]?.path ?? ''
      this.result.title = clean(first.includes('/') ? first.split('/')[0]! : stemOf(first), 300)
      return
    }
    const heading = divide(main.page.pieces, '').title
    const folder = main.path.includes('/') ? main.path.split('/')[0]! : ''
    const isPlain =
      /^(assembly|assemble|instructions?|build( guide| instructions)?|bill of materials|bom|parts|guide|manual|3d printing|readme|index)\W*$/i.test(
        heading,
      )
    this.result.title = clean(
      heading === '' || (isPlain && folder !== '') ? folder || stemOf(main.path) : heading,
      300,
    )
    this.result.lang = languageOf(main.text)
    const opening = main.page.pieces
      .filter((piece) => piece.kind === 'paragraph')
      .map(({ words }) => plainWords(words))
      .find((text) => text.length >= 30)
    this.result.summary = clean(opening ?? '', 4000)
  }

  // Parts

  private addSheets(file: Extract<BroughtFile, { kind: 'sheets' }>): void {
    for (const { name, cells } of file.sheets) {
      const tables = readTable(cells, file.path, clean(name, 300), this.key('table'))
      if (tables.length === 0) this.unused(name, file.path, 'This sheet is empty.')
      for (const table of tables) this.addTable(table)
    }
  }

  private addCells(file: Extract<BroughtFile, { kind: 'text' }>): void {
    const tables = readTable(readCells(file.text), file.path, '', this.key('table'))
    if (tables.length === 0) this.unused(file.path, file.path, 'This table is empty.')
    for (const table of tables) this.addTable(table)
  }

  private addTable(table: UnderstoodTable): LineOfRow[] {
    this.result.tables.push(table)
    const lines = linesOfTable(table)
    for (const { line, addresses } of lines) {
      this.addresses.set(line.key, { from: table.from, addresses })
      this.addLine(line)
    }
    return lines
  }

  private addLine(line: UnderstoodLine): void {
    this.result.lines.push(line)
    const key = nameKey(line.name)
    if (key !== '' && !this.byName.has(key)) this.byName.set(key, line)
  }

  /** Parts lists out of a page: what remains is text. */
  private takeTables(
    page: ReadPage,
    division: Division,
    isGuide: boolean,
    pages: number,
  ): {
    page: ReadPage
    sections: { title: string; portions: (Portion & { uses: FoundUse[]; lines: LineOfRow[] })[] }[]
  } {
    const isParts =
      isPartsTitle(division.title) || /(^|[/_-])(bom|parts?(list)?|materials?)\.[a-z]+$/i.test(page.path)
    const tells = !isParts && !isOld(page.path) && (tellsSteps(page, division, pages) || !isGuide)
    // The README of a design with pages of its own for building: only what it sets out as steps is one.
    const strict = pages > 1 && /(^|\/)readme\.[^/]*$/i.test(page.path) && division.by !== 'numbered headings'
    this.addTools(division.tools)
    this.findChoices(page)
    const sections = division.sections.map(({ title, portions }) => ({
      title,
      portions: portions.map((portion) => {
        const { uses, rest } = takeParts(portion.pieces)
        const { kept, lines } = this.tablesOf(rest, page.path, portion.title)
        return {
          ...portion,
          pieces: kept,
          uses,
          lines: isParts ? [] : lines,
          include: portion.include && tells && (!strict || portion.isSetOut === true),
        }
      }),
    }))
    const listed = division.parts.flatMap(({ title, pieces }) => {
      const { kept, lines } = this.tablesOf(pieces, page.path, title)
      const rest = kept.filter((piece) => {
        if (piece.kind !== 'list' || lines.length > 0) return true
        for (const use of usesOfList(piece)) this.addLine(this.lineFor(use, true))
        return false
      })
      return isWordless(rest) && picturesOf(rest).length === 0
        ? []
        : [{ title: bareTitle(title || division.title), pieces: rest, include: false, uses: [], lines: [] }]
    })
    return {
      page,
      sections: listed.length === 0 ? sections : [...sections, { title: division.title, portions: listed }],
    }
  }

  private tablesOf(
    pieces: readonly Piece[],
    from: string,
    title: string,
  ): { kept: Piece[]; lines: LineOfRow[] } {
    const kept: Piece[] = []
    const lines: LineOfRow[] = []
    for (const piece of pieces) {
      const caption = captionOf(kept.at(-1))
      const name = clean(bareTitle(caption ?? title), 300)
      const tables = piece.kind === 'table' ? readTable(piece.cells, from, name, this.key('table')) : []
      if (
        piece.kind === 'table' &&
        tables.some(({ columns, headingRow }) => headingRow !== null && isPartsList(columns))
      ) {
        if (caption !== undefined) kept.pop()
        for (const table of tables) lines.push(...this.addTable(table))
        if (piece.pictures.length > 0) kept.push({ kind: 'paragraph', words: [], pictures: piece.pictures })
      } else kept.push(piece)
    }
    return { kept, lines }
  }

  private addTools(pieces: readonly Piece[]): void {
    const add = (text: string): void => {
      const name = clean(text, 300)
      if (name !== '') this.result.tools.push({ key: this.key('tool'), name, include: true })
    }
    for (const piece of pieces) {
      if (piece.kind === 'list') for (const item of piece.items) add(item.map(plainPiece).join(' '))
      else if (piece.kind === 'table') {
        for (const table of readTable(piece.cells, '', '', 'tools')) {
          const name = table.columns.find(({ meaning }) => meaning === 'name') ?? table.columns[0]
          for (const row of table.rows) if (row.kind === 'line') add(plainCell(cellOf(row, name)))
        }
      } else if (plainPiece(piece) !== '')
        this.unused(plainPiece(piece), '', 'Text among the tools. Put it where it belongs by hand.')
    }
  }

  private lineFor(use: FoundUse, include: boolean): UnderstoodLine {
    const { name, specification } = splitName(clean(use.name, 4000))
    return {
      key: this.key('line'),
      name,
      specification,
      designation: '',
      kind: 'bought',
      quantity: use.quantity,
      asNeeded: false,
      typed: use.sentence === null ? clean(use.typed, 200) : '',
      note: '',
      sources: [],
      substitutes: [],
      modelKey: null,
      tableKey: null,
      include,
    }
  }

  // Steps

  private addSections(page: ReadPage, sections: ReturnType<Reading['takeTables']>['sections']): void {
    for (const { title, portions } of sections) {
      const steps = portions
        .filter(({ pieces, uses }) => uses.length > 0 || picturesOf(pieces).length > 0 || !isWordless(pieces))
        .map((portion) => this.stepOf(page, portion))
      if (steps.length === 0) continue
      const include = steps.some((step) => step.include)
      this.result.sections.push({
        key: this.key('section'),
        title: clean(title, 300),
        from: page.path,
        include,
        steps,
      })
    }
  }

  private stepOf(
    page: ReadPage,
    portion: Portion & { uses: FoundUse[]; lines: LineOfRow[] },
  ): UnderstoodStep {
    const text = portion.pieces.map(readable).join('\n')
    const minutes = text
      .split('\n')
      .map(findMinutes)
      .find((found) => found !== undefined)
    const figures = picturesOf(portion.pieces).flatMap((picture) => this.figureOf(page.path, picture) ?? [])
    const uses = [
      ...portion.lines.map(({ line }) => this.useOf(line, line, null, true)),
      ...portion.uses.map((use) => this.useFor(use, true)),
      ...(portion.include ? usesInText(text) : []).map((use) => this.useFor(use, false)),
    ]
    for (const figure of figures.slice(100))
      this.unused(figure.path, page.path, 'A step holds at most 100 pictures.')
    return {
      key: this.key('step'),
      title: clean(portion.title, 300),
      include: portion.include,
      body: toBody(portion.pieces),
      minutes: minutes ?? null,
      figures: figures.slice(0, 100),
      uses: uses.slice(0, 200),
      cautions: findCautions(portion.pieces).map((caution) => ({
        key: this.key('caution'),
        ...caution,
        include: false,
      })),
    }
  }

  private useFor(found: FoundUse, include: boolean): UnderstoodUse {
    const known = this.byName.get(nameKey(found.name))
    const line = known ?? this.lineFor(found, include)
    if (known === undefined) this.addLine(line)
    else if (
      known.tableKey === null &&
      known.quantity !== null &&
      found.quantity !== null &&
      known.quantity.unit === found.quantity.unit
    ) {
      // A line that only steps name needs what all of them take.
      const { typed: _, ...sum } = {
        ...known.quantity,
        value: added(known.quantity.value, found.quantity.value),
      }
      known.quantity = sum
      known.typed = ''
      known.include = known.include || include
    }
    return this.useOf(line, found, found.sentence, include)
  }

  private useOf(
    line: UnderstoodLine,
    of: Pick<UnderstoodUse, 'typed' | 'quantity'>,
    sentence: string | null,
    include: boolean,
  ): UnderstoodUse {
    return {
      key: this.key('use'),
      lineKey: line.key,
      typed: clean(of.typed, 200),
      quantity: of.quantity,
      sentence,
      include,
    }
  }

  /** Headings and items that offer a way among several. */
  private findChoices({ path, page }: ReadPage): void {
    const offered = (pieces: readonly Piece[]): string[] =>
      pieces.flatMap((piece) =>
        piece.kind === 'list'
          ? piece.items.flatMap(offered)
          : piece.kind === 'heading' || piece.kind === 'paragraph'
            ? [plainWords(piece.words)]
            : [],
      )
    for (const what of offered(page.pieces)) {
      if (isChoice(what))
        this.result.choices.push({ what: clean(bareTitle(what), 300), where: clean(path, 2000) })
    }
  }

  private figureOf(from: string, picture: Picture): UnderstoodFigure | undefined {
    if (picture.address === '') return undefined
    if (/shields\.io|\/badges?[/.]|badge\.svg|badgen\.net/i.test(picture.address)) {
      this.unused(picture.alt || picture.address, from, 'A badge says nothing about building.')
      return undefined
    }
    const { state, path } = findFile(picture.address, from, this.paths)
    const file = this.byPath.get(path)
    this.shown.add(path)
    const sha256 = file?.kind === 'picture' ? file.sha256 : null
    const seen = state === 'found' && sha256 === null ? 'missing' : state
    if (seen === 'missing') {
      const why =
        file?.kind === 'unused'
          ? file.why
          : 'The page shows this picture, and it was not among the files. Bring it in.'
      this.unused(path, from, why)
    } else if (seen === 'remote')
      this.unused(
        picture.address,
        from,
        'This picture lies elsewhere and is not fetched. Save it and bring it in.',
      )
    const alt = /^(image|img|alt text|picture|photo|\d+)$/i.test(picture.alt) ? '' : picture.alt
    return {
      key: this.key('figure'),
      path: clean(path, 2000),
      alt: clean(alt, 4000),
      caption: clean(picture.title, 4000),
      sha256,
      state: seen,
      include: seen === 'found',
    }
  }

  // Models

  private addModels(): void {
    for (const file of this.files) {
      if (file.kind !== 'model') continue
      const old = isOld(file.path)
      const model: UnderstoodModel = {
        key: this.key('model'),
        path: clean(file.path, 2000),
        name: clean(modelName(file.path), 300),
        sha256: file.sha256,
        lineKey: null,
        number: numberInName(file.path),
        include: !old,
      }
      const line = this.lineOfModel(model) ?? this.addPrintedLine(model)
      model.lineKey = line.key
      if (line.modelKey === null) line.modelKey = model.key
      line.kind = 'printed'
      this.result.models.push(model)
    }
  }

  private lineOfModel(model: UnderstoodModel): UnderstoodLine | undefined {
    const named = this.result.lines.find(({ key }) => {
      const row = this.addresses.get(key)
      return row?.addresses.some((address) => {
        const found = findFile(address, row.from, this.paths)
        return found.state === 'found' && found.path === model.path
      })
    })
    const same = this.byName.get(nameKey(model.name))
    return named ?? (same?.modelKey === null ? same : undefined)
  }

  private addPrintedLine(model: UnderstoodModel): UnderstoodLine {
    const typed = model.number === null ? '' : String(model.number)
    const quantity = model.number === null ? null : ({ value: typed, unit: 'each' } as const)
    const line = {
      ...this.lineFor({ name: model.name, typed, quantity, sentence: null }, model.include),
      name: model.name,
      specification: '',
      kind: 'printed' as const,
    }
    this.addLine(line)
    return line
  }

  // The end

  private listUnused(): void {
    for (const file of this.files) {
      if (file.kind === 'unused' && !this.shown.has(file.path)) this.unused(file.path, file.path, file.why)
      else if (file.kind === 'picture' && !this.shown.has(file.path))
        this.unused(file.path, file.path, 'No page shows this picture.')
      else if (
        file.kind === 'text' &&
        !PAGE.test(file.path) &&
        !CELLS.test(file.path) &&
        !isLicenceFile(file.path)
      ) {
        this.unused(file.path, file.path, 'Nothing is read from files of this kind.')
      }
    }
  }

  /** What is more than a guide can hold is listed and left out. */
  private bounded(): Understanding {
    const { sections, lines, tables, models, tools } = this.result
    const over = (list: readonly unknown[], most: number, what: string): void => {
      if (list.length > most)
        this.unused(
          `${list.length - most} ${what}`,
          '',
          `A guide holds at most ${most} ${what} from one import. Bring the rest in separately.`,
        )
    }
    over(sections, 200, 'sections')
    over(lines, 2000, 'lines')
    over(tables, 200, 'tables')
    over(models, 1000, 'models')
    over(tools, 500, 'tools')
    for (const { steps, title } of sections) over(steps, 500, `steps in “${title}”`)
    return {
      ...this.result,
      sections: sections.slice(0, 200).map((section) => ({ ...section, steps: section.steps.slice(0, 500) })),
      lines: lines.slice(0, 2000),
      tables: tables.slice(0, 200),
      models: models.slice(0, 1000),
      tools: tools.slice(0, 500),
      choices: this.result.choices.slice(0, 1000),
    }
  }
}

/** Whether a page tells how to build, by how it divides, its name or its being the only one. */
function tellsSteps({ path }: ReadPage, division: Division, pages: number): boolean {
  if (division.by === null) return false
  if (division.by !== 'headings' && division.by !== 'pictures') return true
  const words =
    /build|assembl|instruct|guide|manual|mount|wiring|prepar|procedure|print|montage|aufbau|anleitung|montaje|montagem/i
  return pages === 1 || words.test(path) || words.test(division.title)
}

/** Bold words right above a table are its title. */
function captionOf(piece: Piece | undefined): string | undefined {
  if (piece?.kind !== 'paragraph' || piece.pictures.length > 0 || piece.words.length !== 1) return undefined
  const [word] = piece.words
  const bold = word?.type === 'text' && word.marks?.some(({ type }) => type === 'strong') === true
  return bold && word.text.length <= 100 ? word.text : undefined
}

/** Lines of a text, one for each block. */
function readable(piece: Piece): string {
  if (piece.kind === 'list') return piece.items.map((item) => item.map(readable).join('\n')).join('\n')
  if (piece.kind === 'note') return piece.pieces.map(readable).join('\n')
  return plainPiece(piece)
}

/** "Wood screws 12x4. Make sure …" → name and the rest. */
function splitName(text: string): { name: string; specification: string } {
  const sentence = /^(.{3,}?[^\d\s])[.;]\s+(.*)$/su.exec(text)
  if (sentence !== null)
    return { name: sentence[1]!.slice(0, 300), specification: sentence[2]!.slice(0, 4000) }
  return text.length <= 120
    ? { name: text, specification: '' }
    : { name: `${text.slice(0, 118)} …`, specification: text }
}

const added = (a: string, b: string): string => String(Math.round((Number(a) + Number(b)) * 1e6) / 1e6)

const stemOf = (path: string): string =>
  (path.split('/').at(-1) ?? path).replace(/\.[^.]*$/, '').replace(/[_-]+/g, ' ')

/** Text that a document can hold: whole characters, of at most so many letters. */
const clean = (text: string, most: number): string =>
  text
    .slice(0, most)
    .replace(/\p{Surrogate}/gu, '\uFFFD')
    .replace(/\0/g, '')
