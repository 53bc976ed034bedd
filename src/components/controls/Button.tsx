import { useId, type ComponentPropsWithRef, type MouseEvent } from 'react'

export interface ButtonProps extends ComponentPropsWithRef<'button'> {
  /** `go` is the one filled button of a screen, `quiet` looks like a link. */
  kind?: 'go' | 'plain' | 'quiet'
  /** The work that it started goes on: it keeps its place and its focus, and takes no second press. */
  busy?: boolean
  /** Why it cannot be used yet. The reason stands beside it, and the button can still be reached by keyboard to hear it. */
  blockedBecause?: string
}

/** A button. Its words say what happens: "Publish revision C", not "OK". */
export function Button({
  kind = 'plain',
  busy = false,
  blockedBecause,
  className,
  onClick,
  ...rest
}: ButtonProps) {
  const id = useId()
  const blocked = blockedBecause !== undefined && blockedBecause !== ''
  const press = (event: MouseEvent<HTMLButtonElement>): void => {
    // aria-disabled keeps the focus and the reason readable; the press itself is stopped here, a form's submit too.
    if (busy || blocked) event.preventDefault()
    else onClick?.(event)
  }
  const button = (
    <button
      type="button"
      {...rest}
      className={['button', kind !== 'plain' && kind, className].filter(Boolean).join(' ')}
      aria-busy={busy || undefined}
      aria-disabled={busy || blocked || undefined}
      aria-describedby={blocked ? id : rest['aria-describedby']}
      onClick={press}
    />
  )
  if (!blocked) return button
  return (
    <span className="blocked">
      {button}
      <span className="note" id={id}>
        {blockedBecause}
      </span>
    </span>
  )
}
