// @vitest-environment happy-dom
import { cleanup, fireEvent, render, screen } from '@testing-library/react'
import { afterEach, beforeEach, expect, test, vi } from 'vitest'
import strings from '../locales/en/viewer.json'
import { ModelViewer } from './ModelViewer'

/** There is no graphics card here: what is tested is everything that happens without one. tests/e2e opens a real view. */
let context: object | null = null
beforeEach(() => {
  context = { getExtension: () => null }
  vi.spyOn(HTMLCanvasElement.prototype, 'getContext').mockImplementation(() => context as never)
  vi.spyOn(globalThis, 'fetch').mockReturnValue(new Promise<Response>(() => undefined))
})
afterEach(() => {
  cleanup()
  vi.restoreAllMocks()
})

const show = (onClose?: () => void) =>
  render(<ModelViewer src="/files/x/glb" label="Runner" strings={strings} onClose={onClose} />)

test('says so where WebGL is missing, and its buttons cannot be pressed', () => {
  context = null
  show()
  expect(screen.getByRole('alert').textContent).toContain(strings.noWebgl)
  expect(screen.queryByText(strings.retry)).toBeNull()
  for (const name of [strings.fit, strings.zoomIn, strings.top])
    expect(screen.getByRole('button', { name }).hasAttribute('disabled')).toBe(true)
})

test('says that it waits while the model is on its way', () => {
  show()
  expect(screen.getByLabelText(strings.loading).tagName).toBe('PROGRESS')
})

test('an address that does not answer can be tried again', async () => {
  const fetched = vi
    .spyOn(globalThis, 'fetch')
    .mockImplementation(async () => new Response('', { status: 404 }))
  show()
  expect((await screen.findByRole('alert')).textContent).toContain(strings.failed)
  expect(fetched).toHaveBeenCalledTimes(1)
  fireEvent.click(screen.getByText(strings.retry))
  await vi.waitFor(() => expect(fetched).toHaveBeenCalledTimes(2))
})

test('no network is a failure that can be tried again', async () => {
  vi.spyOn(globalThis, 'fetch').mockRejectedValue(new TypeError('Failed to fetch'))
  show()
  expect((await screen.findByRole('alert')).textContent).toContain(strings.failed)
})

test('bytes that are no model are said to be damaged, and trying again is not offered', async () => {
  vi.spyOn(globalThis, 'fetch').mockImplementation(async () => new Response('not a model'))
  show()
  expect((await screen.findByRole('alert')).textContent).toContain(strings.damaged)
  expect(screen.queryByText(strings.retry)).toBeNull()
})

test('Escape and the button close it; without a way to close there is no button', () => {
  context = null
  const close = vi.fn()
  const { container, unmount } = show(close)
  fireEvent.keyDown(container.firstElementChild!, { key: 'Escape' })
  fireEvent.click(screen.getByRole('button', { name: strings.close }))
  expect(close).toHaveBeenCalledTimes(2)
  unmount()
  show()
  expect(screen.queryByRole('button', { name: strings.close })).toBeNull()
})
