// @vitest-environment happy-dom
import { act, cleanup, fireEvent, render, screen, within } from '@testing-library/react'
import { I18nextProvider } from 'react-i18next'
import type { ReactElement } from 'react'
import { afterEach, describe, expect, it, vi } from 'vitest'
import { createI18n } from '../../lib/i18n'
import { NoAnswer, RequestProblem } from '../../lib/request'
import { Busy } from './Busy'
import { Button } from './Button'
import { Checkbox } from './Checkbox'
import { Combobox } from './Combobox'
import { ConfirmDialog } from './ConfirmDialog'
import { ErrorSummary } from './ErrorSummary'
import { Menu } from './Menu'
import { NumberField } from './NumberField'
import { PasswordField } from './PasswordField'
import { RadioGroup } from './RadioGroup'
import { Select } from './Select'
import { Status } from './Status'
import { TextArea } from './TextArea'
import { TextField } from './TextField'

const show = (page: ReactElement, language = 'en') =>
  render(<I18nextProvider i18n={createI18n(language)}>{page}</I18nextProvider>)
afterEach(cleanup)

describe('Button', () => {
  it('takes no press while it is busy, and keeps the focus', () => {
    const press = vi.fn()
    show(
      <Button busy onClick={press}>
        Save
      </Button>,
    )
    const button = screen.getByRole('button', { name: 'Save' })
    button.focus()
    fireEvent.click(button)
    expect(press).not.toHaveBeenCalled()
    expect(button.getAttribute('aria-busy')).toBe('true')
    expect(document.activeElement).toBe(button)
  })

  it('says beside it why it cannot be used, and does not send its form', () => {
    const send = vi.fn((event: { preventDefault: () => void }) => event.preventDefault())
    show(
      <form onSubmit={send}>
        <Button type="submit" blockedBecause="Give the guide a title first.">
          Publish
        </Button>
      </form>,
    )
    const button = screen.getByRole('button', { name: 'Publish' })
    fireEvent.click(button)
    expect(send).not.toHaveBeenCalled()
    const reason = document.getElementById(button.getAttribute('aria-describedby') ?? '')
    expect(reason?.textContent).toBe('Give the guide a title first.')
  })
})

describe('fields', () => {
  it.each([
    ['TextField', <TextField key="f" label="Mass" description="In kilograms." error="Give a mass." />],
    ['TextArea', <TextArea key="f" label="Mass" description="In kilograms." error="Give a mass." />],
    ['NumberField', <NumberField key="f" label="Mass" description="In kilograms." error="Give a mass." />],
    [
      'PasswordField',
      <PasswordField key="f" label="Mass" description="In kilograms." error="Give a mass." />,
    ],
    ['Select', <Select key="f" options={[]} label="Mass" description="In kilograms." error="Give a mass." />],
    ['Checkbox', <Checkbox key="f" label="Mass" description="In kilograms." error="Give a mass." />],
  ])('%s ties label, description and error to the control', (_name, field) => {
    show(field)
    const control = screen.getByLabelText('Mass', { exact: true })
    const described = (control.getAttribute('aria-describedby') ?? '')
      .split(' ')
      .map((id) => document.getElementById(id)?.textContent)
    expect(described).toEqual(['In kilograms.', 'Give a mass.'])
    expect(control.getAttribute('aria-invalid')).toBe('true')
  })

  it('is not wrong without an error', () => {
    show(<TextField label="Mass" error="" />)
    const control = screen.getByLabelText('Mass')
    expect(control.getAttribute('aria-invalid')).toBeNull()
    expect(control.getAttribute('aria-describedby')).toBeNull()
  })

  it('marks what may stay empty in the language of the page', () => {
    show(<TextField label="الكتلة" optional />, 'ar')
    expect(screen.getByText('(اختياري)')).toBeTruthy()
  })

  it('keeps a number as it was typed', () => {
    const change = vi.fn()
    show(<NumberField label="Length" defaultValue="" onChange={(event) => change(event.target.value)} />)
    fireEvent.change(screen.getByLabelText('Length'), { target: { value: '0.30' } })
    expect(change).toHaveBeenLastCalledWith('0.30')
  })

  it('shows a password and hides it again', () => {
    show(<PasswordField label="Password" />)
    const control = screen.getByLabelText('Password', { selector: 'input' })
    fireEvent.click(screen.getByRole('button', { name: 'Show Password' }))
    expect(control.getAttribute('type')).toBe('text')
    fireEvent.click(screen.getByRole('button', { name: 'Hide Password' }))
    expect(control.getAttribute('type')).toBe('password')
  })

  it('names a group of choices by its legend and tells the one that was chosen', () => {
    const change = vi.fn()
    show(
      <RadioGroup
        label="Part"
        value="a"
        onChange={(event) => change(event.target.value)}
        options={[
          { value: 'a', label: 'Generator' },
          { value: 'b', label: 'Alternator' },
        ]}
      />,
    )
    const group = screen.getByRole('group', { name: 'Part' })
    fireEvent.click(within(group).getByLabelText('Alternator'))
    expect(change).toHaveBeenCalledWith('b')
  })
})

describe('Combobox', () => {
  it('finds by typing and chooses by Enter', () => {
    const change = vi.fn()
    show(
      <Combobox
        label="Licence"
        value={null}
        onChange={change}
        items={[
          { id: 'CC-BY-4.0', text: 'Attribution' },
          { id: 'CERN-OHL-S-2.0', text: 'Strongly reciprocal' },
        ]}
      />,
    )
    const box = screen.getByRole('combobox', { name: 'Licence' })
    box.focus()
    fireEvent.change(box, { target: { value: 'stro' } })
    fireEvent.keyDown(box, { key: 'ArrowDown' })
    fireEvent.keyDown(box, { key: 'Enter' })
    expect(change).toHaveBeenCalledWith('CERN-OHL-S-2.0')
  })
})

describe('Menu', () => {
  it('opens by the button and acts on a choice', () => {
    const acted = vi.fn()
    show(
      <Menu actions={[{ id: 'remove', label: 'Remove', onAction: acted }]} label="More about step 3">
        …
      </Menu>,
    )
    fireEvent.click(screen.getByRole('button', { name: 'More about step 3' }))
    fireEvent.click(screen.getByRole('menuitem', { name: 'Remove' }))
    expect(acted).toHaveBeenCalledOnce()
  })
})

describe('ConfirmDialog', () => {
  const ask = (confirmed: () => Promise<void>, close: () => void) =>
    show(
      <ConfirmDialog title="Remove Mira?" confirm="Remove" open onClose={close} onConfirm={confirmed}>
        She keeps what she wrote.
      </ConfirmDialog>,
    )

  it('closes when the act is done', async () => {
    const close = vi.fn()
    ask(() => Promise.resolve(), close)
    expect(screen.getByRole('alertdialog', { name: 'Remove Mira?' })).toBeTruthy()
    fireEvent.click(screen.getByRole('button', { name: 'Remove' }))
    await vi.waitFor(() => expect(close).toHaveBeenCalledOnce())
  })

  it('stays and says what went wrong', async () => {
    const close = vi.fn()
    ask(() => Promise.reject(new NoAnswer('')), close)
    fireEvent.click(screen.getByRole('button', { name: 'Remove' }))
    const alert = await screen.findByText(/no answer from the site/)
    expect(alert.getAttribute('role')).toBe('alert')
    expect(close).not.toHaveBeenCalled()
  })

  it('tells a refusal in the language of the page', async () => {
    const refusal = new RequestProblem({
      type: '/problems/too-many',
      status: 429,
      title: 'Too many requests.',
    })
    show(
      <ConfirmDialog title="س" confirm="نفّذ" open onClose={vi.fn()} onConfirm={() => Promise.reject(refusal)}>
        س
      </ConfirmDialog>,
      'ar',
    )
    fireEvent.click(screen.getByRole('button', { name: 'نفّذ' }))
    expect(await screen.findByText(/طلبات كثيرة/)).toBeTruthy()
  })
})

describe('ErrorSummary', () => {
  const errors = [
    { fieldId: 'mass', label: 'Mass', sentence: 'Give a mass.' },
    { sentence: 'The disk is full.' },
  ]

  it('takes the focus after a try, and leads to each field', () => {
    const page = (attempt: number) => (
      <I18nextProvider i18n={createI18n('en')}>
        <ErrorSummary errors={errors} attempt={attempt} />
        <input id="mass" />
      </I18nextProvider>
    )
    const { rerender } = render(page(0))
    const summary = screen.getByRole('group', { name: '2 things must be mended first:' })
    expect(document.activeElement).not.toBe(summary)
    rerender(page(1))
    expect(document.activeElement).toBe(summary)
    fireEvent.click(screen.getByRole('link', { name: 'Mass: Give a mass.' }))
    expect(document.activeElement?.id).toBe('mass')
    rerender(page(2))
    expect(document.activeElement).toBe(summary)
  })
})

describe('what is said', () => {
  it('keeps the live region in place before it speaks', () => {
    show(<Status kind="done">{null}</Status>)
    expect(screen.getByRole('status').textContent).toBe('')
  })

  it('shows no word for a wait that is not felt', () => {
    vi.useFakeTimers()
    show(<Busy />)
    expect(screen.getByRole('status').textContent).toBe('')
    act(() => vi.advanceTimersByTime(1000))
    expect(screen.getByRole('status').textContent).toBe('Loading…')
    vi.useRealTimers()
  })
})
