import type { ReactNode } from 'react'

/** A ruled section of a page of forms: its name in the margin, the form in the text, and beside it what one should know. */
export function FormSection({
  title,
  side,
  wide = false,
  children,
}: {
  title: string
  side?: ReactNode
  /** Takes the side column too: for a table. */
  wide?: boolean
  children: ReactNode
}) {
  return (
    <section className="form-section row">
      <div className="margin">
        <h2 className="t1">{title}</h2>
      </div>
      <div className={wide ? 'wide stack' : 'text stack'}>{children}</div>
      {side !== undefined && !wide && <div className="side aft note">{side}</div>}
    </section>
  )
}
