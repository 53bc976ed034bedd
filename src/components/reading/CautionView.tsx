import type { Caution, SignalWord } from '../../../shared/guide/schema'
import { useOwnLanguage, useWords } from './useWords'
import { WearMark } from './WearMark'

const SHAPE: Record<SignalWord, string> = {
  danger: 'danger',
  warning: 'warning',
  caution: 'caution-word',
  notice: 'notice',
}

/** A hazard before the action that it concerns. Only the bar of the signal word has a ground; a notice has no alert symbol. */
export function CautionView({ caution }: { caution: Caution }) {
  const { t } = useWords()
  const own = useOwnLanguage()
  const word = t(`guide:signal.${caution.signal}`)
  return (
    <div className={`caution ${SHAPE[caution.signal]}`} role="note" aria-label={word}>
      <p className="signal">
        {caution.signal !== 'notice' && (
          <svg viewBox="0 0 30 27" aria-hidden="true">
            <path d="M15 1.5 28.600 25.200H1.400z" fill="currentColor" />
            <path d="M13.300 9h3.400l-.7 8.600h-2z" className="bang" />
            <circle cx="15" cy="21" r="1.800" className="bang" />
          </svg>
        )}
        {word}
      </p>
      <div className="body">
        <p {...own}>
          <b>{caution.hazard}</b>
        </p>
        {caution.avoid !== '' && <p {...own}>{caution.avoid}</p>}
        {caution.wear.length > 0 && <WearList codes={caution.wear} />}
      </div>
    </div>
  )
}

/** Protective equipment as ruled marks with their code. */
export function WearList({ codes }: { codes: readonly string[] }) {
  const { t } = useWords()
  return (
    <div className="wear">
      {codes.map((code) => (
        <span key={code}>
          <WearMark code={code} />
          {t(`guide:wear.${code}`, { defaultValue: code })} <span className="graphite num">{code}</span>
        </span>
      ))}
    </div>
  )
}
