import type { ReactNode } from 'react'
import type { Block, Inline, ListItem, Mark, RichText } from '../../../shared/guide/schema'
import { Balloon } from './Balloon'
import { useGuide } from './guideView'
import { QuantityView } from './QuantityView'
import { useWords } from './useWords'

/** The text of a step. Ordered lists are its instructions, lettered in the margin. */
export function RichTextView({ text }: { text: RichText }) {
  return text.content.map((block) => <BlockView key={block.attrs.id} block={block} outer />)
}

function BlockView({ block, outer = false }: { block: Block; outer?: boolean }) {
  if (block.type === 'paragraph') {
    if (block.content === undefined) return null
    return (
      <p className={outer ? 'para' : undefined}>
        <InlineView content={block.content} />
      </p>
    )
  }
  if (block.type === 'note') {
    return (
      <div className="remark">
        {block.content.map((inner) => (
          <BlockView key={inner.attrs.id} block={inner} />
        ))}
      </div>
    )
  }
  const List = block.type === 'orderedList' ? 'ol' : 'ul'
  const shape = block.type === 'bulletList' ? 'bullets' : outer ? 'instructions' : 'numbers'
  return (
    <List className={shape}>
      {block.content.map((item) => (
        <ItemView key={item.attrs.id} item={item} />
      ))}
    </List>
  )
}

function ItemView({ item }: { item: ListItem }) {
  return (
    <li>
      {item.attrs.when !== undefined && item.attrs.when.length > 0 && <OnlyWith when={item.attrs.when} />}
      {item.content.map((block) => (
        <BlockView key={block.attrs.id} block={block} />
      ))}
    </li>
  )
}

/** "Only with: alternator", by the names of the options that are asked for. */
export function OnlyWith({ when }: { when: NonNullable<ListItem['attrs']['when']> }) {
  const { t } = useWords()
  const { whole } = useGuide()
  const names = when.flatMap((clause) => {
    const line = whole.lines.find(({ id }) => id === clause.line)
    return (line?.options ?? []).filter(({ id }) => clause.is.includes(id)).map(({ part }) => part.name)
  })
  return <p className="only">{t('onlyWith', { names: names.join(', ') })}</p>
}

function InlineView({ content }: { content: readonly Inline[] }) {
  return content.map((piece, index) => <Piece key={index} piece={piece} />)
}

function Piece({ piece }: { piece: Inline }): ReactNode {
  const { t } = useWords()
  const { doc, numbers, base } = useGuide()
  switch (piece.type) {
    case 'text':
      return marked(piece.text, piece.marks)
    case 'lineBreak':
      return <br />
    case 'balloon':
      return <Balloon line={piece.attrs.line} />
    case 'quantity':
      return marked(<QuantityView {...piece.attrs} />, piece.marks)
    case 'figureRef': {
      const number = numbers.figure[piece.attrs.figure]
      return number === undefined ? null : <a href={`#${piece.attrs.figure}`}>{t('figure', { number })}</a>
    }
    case 'stepRef': {
      const number = numbers.step[piece.attrs.step]
      const step = doc.sections.flatMap(({ steps }) => steps).find(({ id }) => id === piece.attrs.step)
      if (number === undefined || step === undefined) return null
      return <a href={`${base}/steps/${number}`}>{t('stepNumber', { number })}</a>
    }
  }
}

function marked(inside: ReactNode, marks: readonly Mark[] | undefined): ReactNode {
  return (marks ?? []).reduce((wrapped: ReactNode, mark) => {
    if (mark.type === 'strong') return <strong>{wrapped}</strong>
    if (mark.type === 'emphasis') return <em>{wrapped}</em>
    if (mark.type === 'code') return <code className="mono">{wrapped}</code>
    const away = /^https?:/i.test(mark.attrs.href)
    return (
      <a href={mark.attrs.href} rel={away ? 'nofollow ugc noreferrer' : undefined}>
        {wrapped}
      </a>
    )
  }, inside)
}
