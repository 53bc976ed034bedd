// @vitest-environment happy-dom
import { act, cleanup, fireEvent, render, screen, within } from '@testing-library/react'
import { afterEach, expect, test } from 'vitest'
import { emptyDocument } from '../../../../shared/guide/emptyDocument'
import { setNode } from '../../../../shared/guide/edit'
import { RichText, type GuideDocument } from '../../../../shared/guide/schema'
import { newId } from '../state/newId'
import { newLine } from '../step/newLine'
import { useDraft } from '../draftStore'
import { DraftForTests } from '../testing/DraftForTests'
import { StepText } from './StepText'

const belt = newLine(newId, 'Belt')
const start = { ...emptyDocument(newId, { lang: 'en', title: 'A pump' }), lines: [belt] }
const step = start.sections[0]!.steps[0]!
const body: RichText = {
  type: 'doc',
  content: [
    {
      type: 'orderedList',
      attrs: { id: 'list00000001' },
      content: ['Lay the ', 'Tighten'].map((text, index) => ({
        type: 'listItem',
        attrs: { id: `item0000000${index}` },
        content: [
          {
            type: 'paragraph',
            attrs: { id: `para0000000${index}` },
            content: [
              { type: 'text', text },
              ...(index === 0 ? [{ type: 'balloon', attrs: { line: belt.id } } as const] : []),
            ],
          },
        ],
      })),
    },
  ],
}
const written = setNode(start, 'step', step.id, { body })

/** What another author does. */
function Outside() {
  const { edit } = useDraft()
  const other = JSON.parse(JSON.stringify(body).replace('Tighten', 'Loosen')) as RichText
  return (
    <button onClick={() => edit((doc) => setNode(doc, 'step', step.id, { body: other }))}>outside</button>
  )
}

let now: GuideDocument = start
const show = async (document: GuideDocument, readOnly = false) => {
  now = document
  render(
    <DraftForTests document={document} readOnly={readOnly} onDocument={(next) => (now = next)}>
      <StepText stepId={step.id} />
      <Outside />
    </DraftForTests>,
  )
  return screen.findByRole('textbox', { name: 'Text of the step' })
}
const bodyNow = (): RichText => now.sections[0]!.steps[0]!.body
afterEach(cleanup)

test('shows the text with balloons that are read out by number and name', async () => {
  const text = await show(written)
  expect(within(text).getAllByRole('listitem')).toHaveLength(2)
  expect(await within(text).findByRole('img', { name: '1, Belt' })).toBeTruthy()
})

test('opening a text, empty or not, changes nothing', async () => {
  await show(start)
  expect(now).toBe(start)
})

test('the toolbar works on the text and stores what the schema takes', async () => {
  await show(written)
  const tools = screen.getByRole('toolbar', { name: 'Put into the text' })
  fireEvent.click(within(tools).getByRole('button', { name: 'Move the instruction down' }))
  const list = bodyNow().content[0]!
  expect(list.type === 'orderedList' && list.content.map(({ attrs }) => attrs.id)).toEqual([
    'item00000001',
    'item00000000',
  ])
  fireEvent.click(within(tools).getByRole('button', { name: 'Note' }))
  expect(RichText.parse(bodyNow())).toEqual(bodyNow())
})

test('what another author wrote is shown, and not written back', async () => {
  const text = await show(written)
  act(() => fireEvent.click(screen.getByRole('button', { name: 'outside' })))
  expect(text.textContent).toContain('Loosen')
  expect(JSON.stringify(bodyNow())).toContain('Loosen')
})

test('who may only read gets no toolbar', async () => {
  const text = await show(written, true)
  expect(text.getAttribute('contenteditable')).toBe('false')
  expect(screen.queryByRole('toolbar')).toBeNull()
})
