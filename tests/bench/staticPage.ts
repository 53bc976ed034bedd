import { plainText, wordsOf } from '../../shared/guide/plainText'
import type { GuideDocument } from '../../shared/guide/schema'

/** The style that somebody would write by hand for such a page. */
export const HAND_STYLE = `:root{--ink:#1e2320;--paper:#fbfaf5;--rule:#c9c3b2;--red:#9c3b22}
*{box-sizing:border-box}body{margin:0 auto;max-width:44rem;padding:1rem;background:var(--paper);color:var(--ink);font:18px/27px Georgia,serif}
header{border-bottom:1px solid var(--ink);padding-block:.75rem;font-family:Arial,sans-serif}h1{font-size:37px;line-height:45px}h2{font-size:26px;line-height:32px;margin-top:3rem}
h2 span{color:var(--red)}ol{padding-inline-start:1.5rem;list-style:lower-alpha}li+li{margin-top:.75rem}ul{font:15px/22px Arial,sans-serif;padding:0;list-style:none}
ul li{border-bottom:1px solid var(--rule);padding-block:.25rem;margin:0}.warn{border:1px solid;padding:.75rem}.warn b{display:block;background:#f28c28;margin:-.75rem -.75rem .75rem;padding:.25rem .75rem}
footer{margin-top:4rem;border-top:1px solid;font:13px/18px Arial,sans-serif}@media print{header{display:none}}`

const escaped = (text: string): string => text.replace(/&/g, '&amp;').replace(/</g, '&lt;')

/** The same text as all steps of a guide on one page, as somebody would write it by hand, without any script. */
export function staticPage(doc: GuideDocument, style: 'inside' | 'beside'): string {
  const words = wordsOf(doc)
  const head =
    style === 'inside' ? `<style>${HAND_STYLE}</style>` : '<link rel="stylesheet" href="/style.css">'
  let number = 0
  const steps = doc.sections.flatMap((section) =>
    section.steps.map((step) => {
      number += 1
      const parts = step.uses.map(
        (use) => `<li>${escaped(words.line(use.line))} <b>${use.quantity?.value ?? ''}</b></li>`,
      )
      const tools = step.tools.map(
        (id) => `<li>${escaped(doc.tools.find((tool) => tool.id === id)?.name ?? '')}</li>`,
      )
      const cautions = step.cautions.map(
        (caution) =>
          `<div class="warn"><b>${caution.signal.toUpperCase()}</b>${escaped(caution.hazard)} ${escaped(caution.avoid)}</div>`,
      )
      const text = plainText(step.body, words).split('\n')
      const checks = step.checks.map(
        (check) =>
          `<p><b>Check</b> ${escaped(check.text)} ${check.measure?.atLeast ?? ''} to ${check.measure?.atMost ?? ''} ${check.measure?.unit ?? ''}</p>`,
      )
      return `<h2 id="s${number}"><span>${number}</span> ${escaped(step.title)}</h2><p>${escaped(section.title)}, ${step.minutes ?? ''} min</p><ul>${parts.join('')}${tools.join('')}</ul>${cautions.join('')}<ol>${text.map((line) => `<li>${escaped(line)}</li>`).join('')}</ol>${checks.join('')}`
    }),
  )
  return `<!doctype html><html lang="en"><head><meta charset="utf-8"><meta name="viewport" content="width=device-width,initial-scale=1"><title>${escaped(doc.title)}</title>${head}</head><body><header><a href="/">Guides</a></header><h1>${escaped(doc.title)}</h1><p>${escaped(doc.summary)}</p>${steps.join('')}<footer>${escaped(doc.licence)}</footer></body></html>`
}
