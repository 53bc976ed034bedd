import type { ReactNode } from 'react'
import { useWords } from './useWords'

/** The few facts at the foot of each page of a guide that say which paper one has in hand. */
export function TitleBlock({
  facts,
  hash,
}: {
  facts: readonly [label: string, value: ReactNode][]
  hash: string
}) {
  const { t } = useWords()
  return (
    <div className="title-block">
      {facts.map(([label, value]) => (
        <div key={label}>
          <span>{label}</span>
          {value}
        </div>
      ))}
      <div>
        <span>{t('document')}</span>
        <span className="mono" dir="ltr">
          sha256 {hash.slice(0, 4)}…{hash.slice(-4)}
        </span>
      </div>
    </div>
  )
}
