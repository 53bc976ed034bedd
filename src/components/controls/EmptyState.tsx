import type { ReactNode } from 'react'

/** Nothing here yet: one sentence that says what to do next, with the button for it. */
export function EmptyState({ children, action }: { children: ReactNode; action?: ReactNode }) {
  return (
    <div className="empty">
      <p className="t1">{children}</p>
      {action !== undefined && <div className="actions mt-4 justify-center">{action}</div>}
    </div>
  )
}
