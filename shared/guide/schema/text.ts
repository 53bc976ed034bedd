import { z } from 'zod'
import { Id } from '../../lib/ids/id'
import { Condition } from './condition'
import { Measure } from './quantity'

/** Text that UTF-8 can hold. Half a surrogate pair has no canonical JSON, so it is refused at the edge and not when hashing. */
const Text = z
  .string()
  .refine((text) => !/\p{Surrogate}/u.test(text), 'This text holds half a character. Write it again.')

/** Short plain text on one line: titles, names, captions. */
export const Line1 = Text.max(300)
/** Plain text of a few sentences. */
export const Sentences = Text.max(4000)

/** Addresses that a guide may link to: the web, mail, or a place in the guide. Scripts and data are refused. */
export const LinkAddress = z
  .string()
  .max(2000)
  .regex(/^(https?:\/\/|mailto:|#)/i, 'A link begins with https://, http://, mailto: or #.')

const Mark = z.discriminatedUnion('type', [
  z.object({ type: z.literal('strong') }),
  z.object({ type: z.literal('emphasis') }),
  z.object({ type: z.literal('code') }),
  z.object({ type: z.literal('link'), attrs: z.object({ href: LinkAddress }) }),
])
export type Mark = z.infer<typeof Mark>

const marks = z.array(Mark).max(4).optional()

/** What stands within a paragraph. `balloon`, `quantity`, `figureRef` and `stepRef` are set by their targets, not by words. */
export const Inline = z.discriminatedUnion('type', [
  z.object({ type: z.literal('text'), text: Text.min(1).max(20000), marks }),
  z.object({ type: z.literal('lineBreak') }),
  z.object({ type: z.literal('balloon'), attrs: z.object({ line: Id }), marks }),
  z.object({ type: z.literal('quantity'), attrs: Measure, marks }),
  z.object({ type: z.literal('figureRef'), attrs: z.object({ figure: Id }), marks }),
  z.object({ type: z.literal('stepRef'), attrs: z.object({ step: Id }), marks }),
])
export type Inline = z.infer<typeof Inline>

/** Every block of text has a lasting id: a translation's segment and a merge hang on it. */
export const Paragraph = z.object({
  type: z.literal('paragraph'),
  attrs: z.object({ id: Id }),
  content: z.array(Inline).max(2000).optional(),
})
export type Paragraph = z.infer<typeof Paragraph>

export type ListItem = {
  type: 'listItem'
  attrs: { id: Id; when?: z.infer<typeof Condition> }
  content: Block[]
}
export type List = { type: 'orderedList' | 'bulletList'; attrs: { id: Id }; content: ListItem[] }
export type Note = { type: 'note'; attrs: { id: Id }; content: Block[] }
export type Block = Paragraph | List | Note

const ListItem: z.ZodType<ListItem> = z.object({
  type: z.literal('listItem'),
  attrs: z.object({ id: Id, when: Condition.optional() }),
  content: z
    .array(z.lazy(() => Block))
    .min(1)
    .max(200),
})

const List: z.ZodType<List> = z.object({
  type: z.enum(['orderedList', 'bulletList']),
  attrs: z.object({ id: Id }),
  content: z.array(ListItem).min(1).max(500),
})

const Note: z.ZodType<Note> = z.object({
  type: z.literal('note'),
  attrs: z.object({ id: Id }),
  content: z
    .array(z.lazy(() => Block))
    .min(1)
    .max(50),
})

export const Block: z.ZodType<Block> = z.union([Paragraph, List, Note])

/** Nobody nests lists so deep; what does would exhaust the stack of everything that walks a document. */
const DEEPEST = 60

function isShallow(value: unknown): boolean {
  let level: unknown[] = [value]
  for (let depth = 0; level.length > 0; depth += 1) {
    if (depth > DEEPEST) return false
    level = level.flatMap((item) => (typeof item === 'object' && item !== null ? Object.values(item) : []))
  }
  return true
}

/**
 * The rich text of a step: ProseMirror JSON of a closed set of nodes and marks. Instructions are the items of an ordered list
 * (a, b, c). An unknown node is an error at the edge; the importer turns it into text and says so.
 */
export const RichText = z
  .unknown()
  .refine(isShallow, 'The lists of this text are nested too deeply.')
  .pipe(z.object({ type: z.literal('doc'), content: z.array(Block).max(1000) }))
export type RichText = z.infer<typeof RichText>
