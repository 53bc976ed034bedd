import { numbering } from '../../shared/guide/numbering'
import { plainText, wordsOf } from '../../shared/guide/plainText'
import { quantityText } from '../../shared/guide/quantityText'
import { resolve } from '../../shared/guide/resolve'
import type { Block, GuideDocument } from '../../shared/guide/schema'

const escaped = (text: string): string => text.replace(/[&<>"]/g, (letter) => `&#${letter.charCodeAt(0)};`)

/** The same guide as somebody would write it by hand: plain elements, no class that is not needed, a small style sheet beside it. */
export function handWritten(document: GuideDocument, style: { inside: boolean }): string {
  const doc = resolve(document)
  const numbers = numbering(doc)
  const words = wordsOf(doc)
  const text = (block: Block): string => escaped(plainText({ type: 'doc', content: [block] }, words))
  const block = (node: Block): string => {
    if (node.type === 'paragraph') return `<p>${text(node)}</p>\n`
    if (node.type === 'note') return `<blockquote>${node.content.map(block).join('')}</blockquote>\n`
    const items = node.content.map((item) => `<li>${item.content.map(text).join(' ')}</li>`).join('\n')
    return node.type === 'orderedList' ? `<ol>\n${items}\n</ol>\n` : `<ul>\n${items}\n</ul>\n`
  }
  const part = (id: string): string => words.line(id)
  const steps = doc.sections.flatMap((section) =>
    section.steps.map((step) => {
      const number = numbers.step[step.id]!
      const uses = step.uses.map(
        (use) =>
          `<li>${numbers.line[use.line]} ${escaped(part(use.line))}: ${use.quantity === null ? 'as needed' : escaped(quantityText(use.quantity))}</li>`,
      )
      const tools = step.tools.map((id) => escaped(doc.tools.find((tool) => tool.id === id)?.name ?? ''))
      const cautions = step.cautions.map(
        (caution) =>
          `<p class="${caution.signal}"><b>${caution.signal.toUpperCase()}</b> ${escaped(caution.hazard)} ${escaped(caution.avoid)} ${caution.wear.join(', ')}</p>\n`,
      )
      const figures = step.figures.map((id) => {
        const figure = doc.figures.find((candidate) => candidate.id === id)!
        const marks = figure.callouts.map((callout) =>
          'line' in callout ? `${numbers.line[callout.line]} ${escaped(part(callout.line))}` : '',
        )
        return `<figure><img src="img/${numbers.figure[id]}.jpg" width="1600" height="1200" loading="lazy" alt="${escaped(figure.alt)}"><figcaption>Figure ${numbers.figure[id]} ${escaped(figure.caption)} ${marks.join(', ')}</figcaption></figure>\n`
      })
      const checks = step.checks.map((check) => {
        const { measure } = check
        const limits =
          measure === null
            ? ''
            : [
                measure.atLeast === null ? '' : `at least ${measure.atLeast} ${measure.unit}`,
                measure.atMost === null ? '' : `at most ${measure.atMost} ${measure.unit}`,
              ]
                .filter((limit) => limit !== '')
                .join(', ')
        return `<p class="check"><b>Check ${numbers.check[check.id]}</b> ${escaped(check.text)} ${limits} ${escaped(check.otherwise ?? '')}</p>\n`
      })
      return `<h2 id="s${number}">${number}. ${escaped(step.title)}</h2>
<p class="small">Section ${numbers.section[section.id]} ${escaped(section.title)}, ${step.minutes} min, ${step.people === 1 ? 'one person' : `${step.people} people`}</p>
${uses.length === 0 ? '' : `<ul class="parts">\n${uses.join('\n')}\n</ul>\n`}${tools.length === 0 ? '' : `<p class="small">Tools: ${tools.join(', ')}</p>\n`}${cautions.join('')}${step.body.content.map(block).join('')}${figures.join('')}${checks.join('')}`
    }),
  )
  const look = style.inside ? `<style>${STYLE}</style>` : '<link rel="stylesheet" href="style.css">'
  return `<!doctype html>
<html lang="en">
<head>
<meta charset="utf-8">
<meta name="viewport" content="width=device-width, initial-scale=1">
<title>${escaped(doc.title)}</title>
${look}
</head>
<body>
<h1>${escaped(doc.title)}</h1>
<p>${escaped(doc.summary)}</p>
${steps.join('\n')}
</body>
</html>
`
}

export const STYLE = `:root { color-scheme: light dark; --ink: #1e2320; --paper: #fbfaf5; --quiet: #555a53; --line: #c9c3b2; --accent: #9c3b22 }
@media (prefers-color-scheme: dark) { :root { --ink: #edebe2; --paper: #1b2022; --quiet: #aeb5b0; --line: #414a4c; --accent: #ee8e70 } }
body { max-width: 36em; margin: 0 auto; padding: 0 1em 4em; font: 18px/1.5 Georgia, serif; color: var(--ink); background: var(--paper) }
h1 { font-size: 2.2em; line-height: 1.15 }
h2 { margin-top: 2.5em; border-top: 1px solid var(--line); padding-top: .5em; font-size: 1.5em; line-height: 1.2 }
.small, .parts, figcaption { font: 15px/1.5 Arial, sans-serif; color: var(--quiet) }
.parts { list-style: none; padding: 0 }
ol { list-style: lower-alpha; padding-left: 1.5em }
ol li { margin-top: .6em }
ol li::marker { color: var(--accent); font-weight: bold }
figure { margin: 1.5em 0 }
img { max-width: 100%; height: auto }
.danger, .warning, .caution, .notice { border: 1px solid; padding: .6em .8em }
.danger b { color: #b5121b }
.check { border-top: 2px solid; border-bottom: 1px solid; padding: .6em 0 }
blockquote { margin: 1em 0; border-left: 3px solid var(--line); padding-left: 1em }
@media print { body { max-width: none } h2 { break-after: avoid } figure { break-inside: avoid } }
`
