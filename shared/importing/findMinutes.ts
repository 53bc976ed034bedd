const LABEL =
  /^\W*(?:estimated\s+)?(?:assembly\s+|build\s+|print(?:ing)?\s+)?(?:time|duration|zeit|zeitaufwand|dauer|tiempo|tempo|temps|durée|duração|时间|時間|预计时间|الوقت|المدة)\b[^:：]*[:：]\s*(.+)$/iu
const UNITS: [RegExp, number][] = [
  [/^(?:h|hr|hrs|hours?|std|stunden?|horas?|heures?|ore|小时|時間|ساعات|ساعة)$/i, 60],
  [/^(?:min|mins|minutes?|minuten|minutos?|minuti|分|分钟|دقائق|دقيقة)$/i, 1],
]

/**
 * Minutes from a line such as "Time: 0:03 to 0:15" (hours and minutes) or "Estimated time: 2 hours"; the larger of two, since a step
 * that takes longer than it says is worse.
 * @returns undefined for a line that says no time.
 */
export function findMinutes(line: string): number | undefined {
  const told = LABEL.exec(line.trim())?.[1]
  if (told === undefined || told.length > 80) return undefined
  const clock = [...told.matchAll(/\b(\d{1,3}):(\d{2})\b/g)].map(
    (match) => Number(match[1]) * 60 + Number(match[2]),
  )
  if (clock.length > 0) return bounded(Math.max(...clock))
  const values = [
    ...told.matchAll(/(\d+(?:[.,]\d+)?)(?:\s*(?:[-–—]|to|bis|a|à)\s*(\d+(?:[.,]\d+)?))?\s*(\p{L}+)/gu),
  ].flatMap((match) => {
    const unit = UNITS.find(([pattern]) => pattern.test(match[3]!))?.[1]
    return unit === undefined ? [] : [Number((match[2] ?? match[1]!).replace(',', '.')) * unit]
  })
  return values.length === 0 ? undefined : bounded(Math.max(...values))
}

const bounded = (minutes: number): number => Math.min(100_000, Math.round(minutes))
