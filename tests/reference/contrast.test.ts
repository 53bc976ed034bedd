import { readFileSync } from 'node:fs'
import { describe, expect, test } from 'vitest'
import { contrast } from './contrast'
import { readReference } from './readReference'

const { rows, source } = readReference<{ a: string; b: string; ratio: number }>('contrast')

// Tolerance: the reference is rounded to four digits behind the point.
test.each(rows)(`$a on $b is $ratio (${source})`, ({ a, b, ratio }) => {
  expect(contrast(a, b)).toBeCloseTo(ratio, 3)
})

const css = readFileSync(new URL('../../src/styles/tokens.css', import.meta.url), 'utf8').replace(
  /\/\*[\s\S]*?\*\//g,
  '',
)

/** The colours that blocks with this selector set. */
function coloursOf(selector: string): Record<string, string> {
  const blocks = [...css.matchAll(/([^{}]+)\{([^{}]*)\}/g)].filter((block) => block[1]!.trim() === selector)
  expect(blocks.length).toBeGreaterThan(0)
  return Object.fromEntries(
    blocks.flatMap((block) =>
      [...block[2]!.matchAll(/--([\w-]+):\s*(#[0-9a-f]{6})\b/gi)].map((match) => [match[1]!, match[2]!]),
    ),
  )
}

const light = coloursOf(':root')
const dark = { ...light, ...coloursOf("[data-theme='dark']") }

test('the dark theme is the same whether it is chosen or the system’s', () => {
  expect(coloursOf(":root:not([data-theme='light'])")).toEqual(coloursOf("[data-theme='dark']"))
})

/** Least ratios. Source: WCAG 2.2, 1.4.3 (text 4.5), 1.4.6 (instructions 7, our own bar), 1.4.11 (controls 3). */
describe.each([
  ['light', light],
  ['dark', dark],
])('%s theme (WCAG 2.2)', (_, colours) => {
  const least = (front: string, ground: string, ratio: number): void => {
    expect(colours[front], front).toBeDefined()
    expect(contrast(colours[front]!, colours[ground]!)).toBeGreaterThanOrEqual(ratio)
  }

  describe.each(['paper', 'stone'])('on %s', (ground) => {
    test('ink has 7:1', () => least('ink', ground, 7))
    test.each(['graphite', 'oxide', 'water', 'lichen', 'ochre'])('%s has 4.5:1', (role) =>
      least(role, ground, 4.5),
    )
    test('borders of controls have 3:1', () => least('rule-strong', ground, 3))
  })

  test.each(['oxide', 'danger', 'warning', 'caution', 'notice'])('text on %s has 4.5:1', (ground) => {
    least(`on-${ground}`, ground, 4.5)
  })
})
