import type { CSSProperties } from 'react'
import type { Check } from '../../../shared/guide/schema'
import { UNITS } from '../../../shared/lib/units/units'
import { useGuide } from './guideView'
import { useOwnLanguage, useWords } from './useWords'

/** A thing to verify; limits stand on the dimension line, which is not mirrored: scales keep left to right, as drawings do. */
export function CheckView({ check }: { check: Check }) {
  const { t } = useWords()
  const own = useOwnLanguage()
  const { numbers } = useGuide()
  return (
    <section className="check" id={check.id}>
      <div className="q">
        <svg viewBox="0 0 24 24" aria-hidden="true">
          <path className="l1" d="M3 3h18v18H3z" />
        </svg>
        <div>
          <p className="label">{t('check', { number: numbers.check[check.id] })}</p>
          <p {...own}>
            <b>{check.text}</b>
          </p>
        </div>
      </div>
      {check.measure !== null && <Limits measure={check.measure} />}
      {check.otherwise !== undefined && check.otherwise !== '' && (
        <p className="para" {...own}>
          {check.otherwise}
        </p>
      )}
    </section>
  )
}

function Limits({ measure }: { measure: NonNullable<Check['measure']> }) {
  const { t, number } = useWords()
  const { symbol } = UNITS[measure.unit]
  const { atLeast, atMost } = measure
  if (atLeast === null && atMost === null) return null
  const style = {
    '--lo': atLeast === null ? '0%' : atMost === null ? '45%' : '28%',
    '--hi': atMost === null ? '100%' : atLeast === null ? '55%' : '72%',
  } as CSSProperties
  const value = (limit: string): string => `${number(limit)}${symbol === '' ? '' : `\u202f${symbol}`}`
  return (
    <div className="band" style={style}>
      {atLeast !== null && <span className="out l" />}
      {atMost !== null && <span className="out r" />}
      <span className="in" />
      {atLeast !== null && <Limit side="l" value={value(atLeast)} word={t('atLeast')} />}
      {atMost !== null && <Limit side="r" value={value(atMost)} word={t('atMost')} />}
    </div>
  )
}

function Limit({ side, value, word }: { side: 'l' | 'r'; value: string; word: string }) {
  return (
    <>
      <span className={`ext ${side}`} />
      <span className={`tick ${side}`} />
      <span className={`lim ${side}`}>
        {value}
        <small>{word}</small>
      </span>
    </>
  )
}
