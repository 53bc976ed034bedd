// @vitest-environment happy-dom
import { cleanup, fireEvent, render, screen, waitFor } from '@testing-library/react'
import { afterEach, expect, test } from 'vitest'
import type { FileEntry } from '../../../../shared/api/files'
import { emptyDocument } from '../../../../shared/guide/emptyDocument'
import type { Callout, GuideDocument } from '../../../../shared/guide/schema'
import { newId } from '../state/newId'
import { newLine } from '../step/newLine'
import { DraftForTests } from '../testing/DraftForTests'
import { addFiles } from './addFiles'
import { StepFigures } from './StepFigures'

const sha256 = 'a'.repeat(64)
const picture: FileEntry = {
  sha256,
  kind: 'picture',
  mediaType: 'image/jpeg',
  bytes: 1,
  name: 'a.jpg',
  state: 'ready',
  trouble: null,
  picture: { width: 800, height: 600 },
  model: null,
  renditions: [{ name: 'webp-960', mediaType: 'image/webp', bytes: 1, width: 800, height: 600 }],
}
const belt = newLine(newId, 'Belt')
const start = { ...emptyDocument(newId, { lang: 'en', title: 'A pump' }), lines: [belt] }
const step = start.sections[0]!.steps[0]!
const figureId = newId()
const withFigure = (callouts: Callout[]): GuideDocument => {
  const doc = addFiles(start, step.id, [{ file: picture, id: figureId }])
  return { ...doc, figures: doc.figures.map((figure) => ({ ...figure, callouts })) }
}
const balloon = (at: { x: number; y: number } | null): Callout => ({
  id: 'callout00001',
  shape: 'balloon',
  line: belt.id,
  at,
  tip: at && { x: 5000, y: 5000 },
})

let now: GuideDocument = start
const show = (document: GuideDocument, file = picture) => {
  now = document
  render(
    <DraftForTests document={document} files={[file]} onDocument={(next) => (now = next)}>
      <StepFigures stepId={step.id} />
    </DraftForTests>,
  )
}
afterEach(cleanup)

test('a callout is moved by keys, and its end too', () => {
  show(withFigure([balloon({ x: 1000, y: 1000 })]))
  const words = screen.getByRole('button', { name: 'balloon 1, Belt, 10 % from the left, 10 % from the top' })
  fireEvent.keyDown(words, { key: 'ArrowRight' })
  fireEvent.keyDown(words, { key: 'ArrowUp', shiftKey: true })
  expect(now.figures[0]!.callouts[0]).toMatchObject({ at: { x: 1100, y: 990 }, tip: { x: 5000, y: 5000 } })
  fireEvent.keyDown(screen.getByRole('button', { name: /^End of balloon 1/ }), { key: 'ArrowLeft' })
  expect(now.figures[0]!.callouts[0]).toMatchObject({ tip: { x: 4900, y: 5000 } })
})

test('Delete removes a callout', () => {
  show(withFigure([balloon({ x: 1000, y: 1000 })]))
  fireEvent.keyDown(screen.getByRole('button', { name: /^balloon 1/ }), { key: 'Delete' })
  expect(now.figures[0]!.callouts).toEqual([])
  expect(screen.getByTestId('said').textContent).toBe('Callout removed.')
})

test('a callout that waits is placed by Enter', () => {
  show(withFigure([balloon(null)]))
  expect(screen.getByText('Drag a balloon on to its part; 1 is not placed yet.')).toBeTruthy()
  fireEvent.keyDown(screen.getByRole('button', { name: 'Place balloon 1, Belt on the picture' }), {
    key: 'Enter',
  })
  expect(now.figures[0]!.callouts[0]).toMatchObject({ tip: { x: 5000, y: 5000 } })
  expect(now.figures[0]!.callouts[0]!.at).not.toBeNull()
})

test('pictures come in by a paste anywhere on the page', async () => {
  show(start)
  const file = new File(['x'], 'a.jpg', { type: 'image/jpeg' })
  fireEvent.paste(document.body, { clipboardData: { files: [file], types: ['Files'] } })
  await waitFor(() => expect(now.figures).toMatchObject([{ asset: sha256, kind: 'photo' }]))
  expect(screen.getByRole('figure', { name: 'Figure 1.1' })).toBeTruthy()
})

test('a picture that is worked on or failed says so', () => {
  show(withFigure([]), { ...picture, state: 'failed', trouble: 'It is cut off.', renditions: [] })
  expect(screen.getByText('It is cut off.')).toBeTruthy()
})

test('caption and alternative text are written; a figure is removed', () => {
  show(withFigure([]))
  fireEvent.change(screen.getByRole('textbox', { name: 'Caption' }), { target: { value: 'The belt' } })
  fireEvent.change(screen.getByRole('textbox', { name: 'Alternative text' }), {
    target: { value: 'A belt on two pulleys' },
  })
  expect(now.figures[0]).toMatchObject({ caption: 'The belt', alt: 'A belt on two pulleys' })
  fireEvent.click(screen.getByRole('button', { name: 'Remove figure 1.1' }))
  expect(now.figures).toEqual([])
})
