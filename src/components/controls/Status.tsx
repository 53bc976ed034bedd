import type { ReactNode } from 'react'

export interface StatusProps {
  /** `done` says that something is so now, `trouble` that it went wrong and what to do. */
  kind?: 'done' | 'trouble' | 'note'
  /** Null keeps the place, empty: a live region must be there before it speaks. */
  children: ReactNode
}

/** What just happened, said to the eye and to screen readers alike. */
export function Status({ kind = 'note', children }: StatusProps) {
  const silent = children === null || children === undefined || children === ''
  return (
    <div
      role={kind === 'trouble' ? 'alert' : 'status'}
      className={silent ? 'status silent' : `status ${kind}`}
      data-kind={kind}
    >
      {children}
    </div>
  )
}
